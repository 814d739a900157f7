import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import published from '#tests/reference/saturation.json' with { type: 'json' };
import units from '#tests/reference/units.json' with { type: 'json' };
import { airPressurePa } from '../atmosphere/atmosphere.ts';
import { toSi } from '../units/units.ts';
import {
  gramsPerYear,
  REFRIGERANTS,
  refrigerantNamed,
  SAFETY_GROUPS,
  type Saturation,
  saturationAt,
  saturationRange,
  saturationTemperature,
  subcoolingK,
  superheatK,
} from './saturation.ts';

type Row = {
  fluid: string;
  T_C: number;
  saturation?: { eos_kPa: number };
  bubble?: { eos_kPa: number };
  dew?: { eos_kPa: number };
  rhoL_kg_m3?: { eos?: number };
};
const rows = published.rows as Row[];
const inRange = rows.filter(
  ({ fluid, T_C: c }) => c >= saturationRange(fluid).fromC && c <= saturationRange(fluid).toC,
);

describe('saturation against the full equations of state (tests/reference/saturation.json)', () => {
  test('every refrigerant is there', () => {
    expect([...new Set(inRange.map(({ fluid }) => fluid))].sort()).toEqual([...REFRIGERANTS].sort());
    expect(Object.keys(SAFETY_GROUPS).sort()).toEqual([...REFRIGERANTS].sort());
  });

  test.each(inRange.map((row) => [row.fluid, row.T_C, row] as const))(
    '%s at %s °C',
    (fluid, temperatureC, row) => {
      const found = saturationAt(fluid, temperatureC) as Saturation;
      const pure = row.saturation?.eos_kPa;
      const within = pure ? 0.0015 : 0.005;
      expect(Math.abs(found.bubblePa / 1000 / (pure ?? row.bubble?.eos_kPa ?? 0) - 1)).toBeLessThan(within);
      expect(Math.abs(found.dewPa / 1000 / (pure ?? row.dew?.eos_kPa ?? 0) - 1)).toBeLessThan(within);
      if (row.rhoL_kg_m3?.eos)
        expect(Math.abs(found.liquidKgPerM3 / row.rhoL_kg_m3.eos - 1)).toBeLessThan(0.003);
    },
  );

  test.each(published.inverse_pressure_to_temperature)('$fluid at $gauge_psi psi, $altitude_m m', (row) => {
    const absolute = toSi(row.gauge_psi, 'psi') + airPressurePa(row.altitude_m);
    const found = saturationTemperature(row.fluid, absolute);
    if ('error' in found) throw new Error(found.error);
    expect(found.bubbleC).toBeCloseTo(row.T_sat_C, 1);
  });
});

describe('saturation, in general', () => {
  test.each(['R-134a', 'R-744', 'R-407C'])('%s outside its range is an error, never a guess', (name) => {
    const { fromC, toC } = saturationRange(name);
    for (const temperature of [fromC - 0.1, toC + 0.1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(saturationAt(name, temperature)).toHaveProperty('error');
    }
    expect(saturationTemperature(name, 1)).toHaveProperty('error');
    expect(saturationTemperature(name, 1e9)).toHaveProperty('error');
  });

  test('there and back again, and always rising', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...REFRIGERANTS),
        fc.double({ min: 0, max: 0.99, noNaN: true }),
        (name, share) => {
          const { fromC, toC } = saturationRange(name);
          const temperature = fromC + share * (toC - fromC);
          const here = saturationAt(name, temperature) as Saturation;
          const warmer = saturationAt(name, temperature + 0.005 * (toC - fromC)) as Saturation;
          expect(warmer.bubblePa).toBeGreaterThan(here.bubblePa);
          expect(warmer.liquidKgPerM3).toBeLessThan(here.liquidKgPerM3);
          expect(here.dewPa).toBeLessThanOrEqual(here.bubblePa);
          const back = saturationTemperature(name, here.bubblePa);
          if (!('error' in back) && here.dewPa === here.bubblePa)
            expect(back.bubbleC).toBeCloseTo(temperature, 6);
        },
      ),
    );
  });

  test('superheat and subcooling of R-134a at its own saturation are nothing', () => {
    const { bubblePa } = saturationAt('R-134a', 10) as Saturation;
    expect(superheatK('R-134a', bubblePa, 16)).toBeCloseTo(6, 6);
    expect(subcoolingK('R-134a', bubblePa, 4)).toBeCloseTo(6, 6);
  });

  test.each(units.refrigerant_leak_rate.rows.filter(({ fluid }) => REFRIGERANTS.includes(fluid)))(
    '$g_per_year g of $fluid a year is $Pa_m3_per_s_20C Pa·m³/s',
    (row) => expect(gramsPerYear(row.fluid, row.Pa_m3_per_s_20C) / row.g_per_year).toBeCloseTo(1, 6),
  );

  test.each([
    ['r134a', 'R-134a'],
    ['R 1234 YF', 'R-1234yf'],
    ['410a', 'R-410A'],
    ['R-999', null],
  ])('%s is %s', (text, name) => expect(refrigerantNamed(text)).toBe(name));
});
