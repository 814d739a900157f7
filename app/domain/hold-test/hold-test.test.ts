import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import synthetic from '#tests/reference/hold-test.json' with { type: 'json' };
import handbook from '#tests/reference/hold-test-handbook.json' with { type: 'json' };
import { UNITS } from '../units/units.ts';
import { analyseHoldTest, type HoldVerdict } from './hold-test.ts';

const ACCEPTED: Record<string, HoldVerdict[]> = {
  tight: ['tight'],
  leak: ['leak'],
  moisture: ['moisture'],
  'gross leak': ['gross-leak'],
  'leak below what the gauge can show': ['tight', 'cannot-tell'],
};
const HANDBOOK: Record<string, HoldVerdict> = {
  tight: 'tight',
  moisture: 'moisture',
  small_leak: 'leak',
  leak: 'leak',
  gross_leak: 'gross-leak',
  inconclusive: 'cannot-tell',
};

describe('the synthetic hold tests of the reference data', () => {
  test.each(synthetic.rows.map((row) => [row.id, row.truth.class, row] as const))(
    '%s: %s',
    (_id, truth, row) => {
      const found = analyseHoldTest(row);
      const tooCoarse = truth === 'moisture' && row.gauge === 'compound' ? ['cannot-tell'] : [];
      expect([...(ACCEPTED[truth] ?? []), ...tooCoarse]).toContain(found?.verdict);
      if (truth === 'leak') {
        const { estimate, low, high } = found?.leakPaM3PerS ?? { estimate: 0, low: 0, high: 0 };
        const within = row.gauge === 'micron' ? 0.15 : 0.5;
        expect(Math.abs(estimate / row.truth.leakPaM3PerS - 1)).toBeLessThan(within);
        expect(low).toBeLessThanOrEqual(estimate);
        expect(high).toBeGreaterThanOrEqual(estimate);
        expect(found?.smallestLeakPaM3PerS).toBeLessThan(row.truth.leakPaM3PerS);
      }
      if (truth.startsWith('leak below'))
        expect(found?.smallestLeakPaM3PerS).toBeGreaterThan(row.truth.leakPaM3PerS);
    },
  );
});

const vacuumCurves = handbook.curves.filter(({ input }) => input.kind === 'vacuum_hold');

describe('the handbook’s hold tests', () => {
  test.each(vacuumCurves.map((curve) => [curve.id, curve.truth.class, curve] as const))(
    '%s: %s',
    (_id, _truth, { input, time_s: times, reading, truth }) => {
      const compound = input.gauge === 'compound_inHg';
      const samples = times.flatMap((time, place) => {
        const value = reading[place];
        if (value === null || value === undefined) return [];
        const pressurePa = compound
          ? input.local_atmosphere_Pa + value * UNITS.inHg.factor
          : value * UNITS.micron.factor;
        return [{ minutes: time / 60, pressurePa: Math.max(pressurePa, 0) }];
      });
      const found = analyseHoldTest({
        samples,
        resolutionPa: compound ? -0.5 * UNITS.inHg.factor : UNITS.micron.factor,
        volumeM3: input.volume_L / 1000,
        ambientC: input.T_C,
        altitudeM: input.altitude_m,
      });
      expect(truth.acceptable_verdicts.map((verdict) => HANDBOOK[verdict])).toContain(found?.verdict);
    },
  );

  test('the smallest leak is one and a half of the published criterion, half an inch of mercury in ten minutes, since both readings are rounded', () => {
    const published = handbook.sensitivity.find(
      ({ criterion, volume_L: litres }) => litres === 2 && criterion.includes('0.5 inHg in 10 min'),
    );
    const resolutionPa = -0.5 * UNITS.inHg.factor;
    const samples = Array.from({ length: 21 }, (_, place) => ({ minutes: place / 2, pressurePa: 0 }));
    const found = analyseHoldTest({ samples, resolutionPa, volumeM3: 0.002, ambientC: 20, altitudeM: 0 });
    expect((found?.smallestLeakPaM3PerS ?? 0) * 10).toBeCloseTo(1.5 * (published?.leak_mbar_L_per_s ?? 0), 4);
  });
});

describe('any hold test', () => {
  test('too little to judge is said', () => {
    const one = { resolutionPa: 1, volumeM3: 0.003, ambientC: 20, altitudeM: 0 };
    expect(analyseHoldTest({ ...one, samples: [] })).toBeNull();
    expect(analyseHoldTest({ ...one, samples: Array(9).fill({ minutes: 3, pressurePa: 50 }) })).toBeNull();
  });

  test('a leak well above what the gauge shows is never called tight, and its size is found', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 3, max: 60, noNaN: true }),
        fc.integer({ min: 10, max: 40 }),
        fc.integer({ min: 0, max: 2000 }),
        (paPerMinute, count, altitudeM) => {
          const samples = Array.from({ length: count }, (_, place) => ({
            minutes: place,
            pressurePa: 30 + paPerMinute * place,
          }));
          const found = analyseHoldTest({
            samples,
            resolutionPa: 1.3332,
            volumeM3: 0.003,
            ambientC: 20,
            altitudeM,
          });
          expect(found?.verdict).toBe('leak');
          expect((found?.leakPaM3PerS?.estimate ?? 0) / ((0.003 * paPerMinute) / 60)).toBeCloseTo(1, 1);
        },
      ),
    );
  });
});
