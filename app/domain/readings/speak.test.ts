import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import charging from '#tests/reference/charging.json' with { type: 'json' };
import { type ChargeWindow, chargeWindow } from '../charge/charge-window.ts';
import { saturationAt } from '../refrigerant/saturation.ts';
import { fromSi, toSi } from '../units/units.ts';
import { readRunning } from './running.ts';
import { analyseStanding, needsRecovery, type StandingAnalysis } from './standing.ts';

const standing = (psi: number, ambientF: number, more = {}) =>
  analyseStanding({
    refrigerant: 'R-134a',
    gaugePa: toSi(psi, 'psi'),
    ambientC: (ambientF - 32) / 1.8,
    altitudeM: 0,
    gaugeErrorPa: toSi(1, 'psi'),
    thermometerErrorK: 1,
    volumeM3: 0.003,
    ...more,
  }) as StandingAnalysis;

describe('standing pressure', () => {
  /** tests/reference/charging.json, computed static pressures of R-134a at sea level and at 1,500 m. */
  test.each(charging.static_pressure.rows)(
    '$static_psig_0m psi at $ambient_F °F means liquid',
    ({ ambient_F: f, static_psig_0m: sea, static_psig_1500m: hill }) => {
      expect(standing(sea, f).verdict).toBe('liquid');
      expect(standing(hill, f, { altitudeM: 1500 }).verdict).toBe('liquid');
      expect(standing(sea - 12, f).verdict).toBe('vapour');
      expect(standing(sea + 12, f).verdict).toBe('above');
      expect(standing(0.5, f).verdict).toBe('empty');
    },
  );

  test('vapour alone weighs little: 3 litres at 2 bar and 20 °C hold about 37 g', () => {
    expect(standing(fromSi(200_000, 'psi'), 68).vapourGrams).toBeCloseTo(37.8, 0);
  });

  test('outside what is computed, an error', () => {
    expect(
      analyseStanding({
        refrigerant: 'R-744',
        gaugePa: 5e6,
        ambientC: 40,
        altitudeM: 0,
        gaugeErrorPa: 0,
        thermometerErrorK: 1,
        volumeM3: null,
      }),
    ).toHaveProperty('error');
  });

  test('anything but empty is recovered first', () => {
    expect((['liquid', 'vapour', 'above', 'empty'] as const).map(needsRecovery)).toEqual([
      true,
      true,
      true,
      false,
    ]);
  });
});

describe('the published window', () => {
  test.each(charging.published_table.rows)('at $ambient_F °F', (row) => {
    const found = chargeWindow('R-134a', row.ambient_C) as ChargeWindow;
    for (const [window, published] of [
      [found.lowPa, row.low_side.psig],
      [found.highPa, row.high_side.psig],
    ] as const) {
      expect(window.map((pascals) => Math.round(fromSi(pascals, 'psi')))).toEqual(published);
    }
  });

  test('the condensing temperature of the high side lies above the air, as the table says', () => {
    const { highPa } = chargeWindow('R-134a', 26.67) as ChargeWindow;
    const at42 = saturationAt('R-134a', 41.8);
    expect('error' in at42 ? 0 : at42.bubblePa - 101_325).toBeCloseTo(highPa[0], -4);
  });

  test('another refrigerant and other weather are errors, never guesses', () => {
    for (const [name, ambient] of [
      ['R-1234yf', 27],
      ['R-134a', 5],
      ['R-134a', 60],
    ] as const)
      expect(chargeWindow(name, ambient)).toHaveProperty('error');
  });

  test('it rises with the air outside', () => {
    fc.assert(
      fc.property(fc.double({ min: 21.2, max: 42, noNaN: true }), (ambient) => {
        const [one, other] = [
          chargeWindow('R-134a', ambient),
          chargeWindow('R-134a', ambient + 1),
        ] as ChargeWindow[];
        expect(other?.highPa[0]).toBeGreaterThan(one?.highPa[0] ?? 0);
      }),
    );
  });

  test.each([
    [5, 90, 'Low charge'],
    [60, 300, 'Too much charge'],
    [60, 90, 'Weak compressor'],
    [5, 300, 'Restriction on the high side'],
    [18, 170, 'Within the window'],
    [18, 300, 'Poor airflow over the condenser'],
  ])('%s and %s psi at 80 °F: %s', (low, high, name) => {
    const found = readRunning(
      toSi(low, 'psi'),
      toSi(high, 'psi'),
      chargeWindow('R-134a', 26.67) as ChargeWindow,
    );
    expect(found.meanings[0]?.name).toBe(name);
    expect(found.meanings.every(({ reason, next }) => reason !== '' && next !== '')).toBe(true);
  });
});
