import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import handbook from '#tests/reference/hold-test-handbook.json' with { type: 'json' };
import { toSi, UNITS } from '../units/units.ts';
import { analyseGasTest, analyseLiquidTest, analyseRamTest } from './pressure-test.ts';

const absolute = (psi: number) => psi * UNITS.psi.factor + 101_325;

describe('a test with a gas', () => {
  const cooling = {
    startPa: absolute(150),
    startC: 38,
    endC: 27,
    resolutionPa: UNITS.psi.factor,
    minutes: 30,
    volumeM3: 0.004,
  };

  test('nitrogen that cools loses pressure without a leak (curve P10 of the handbook set)', () => {
    const curve = handbook.curves.find(({ id }) => id === 'P10');
    const readings = curve?.reading as number[];
    const truth = curve?.true_pressure_Pa ?? [];
    const found = analyseGasTest({ ...cooling, endPa: absolute(readings.at(-1) ?? 0) });
    expect(found.verdict).toBe('tight');
    expect(found.expectedPa / (truth.at(-1) ?? 0)).toBeCloseTo(1, 4);
  });

  test.each([
    [147.9, 38, 'leak'],
    [148.1, 38, 'tight'],
    [151.9, 38, 'tight'],
    [152.1, 38, 'cannot-tell'],
  ] as const)('150 psi that end at %s psi and %s °C with a step of 1 psi: %s', (endPsi, endC, verdict) => {
    expect(analyseGasTest({ ...cooling, endC, endPa: absolute(endPsi) }).verdict).toBe(verdict);
  });

  /**
   * Bleed-down formula of compressed-air handbooks: cfm of free air = V·(P1 − P2)/(T·14.7), V in cubic feet, P in psig,
   * T in minutes. 10 ft³ from 100 to 90 psig in 4 minutes: 1.7007 cfm.
   */
  test('free air lost, by the bleed-down formula', () => {
    const cubicFoot = 0.3048 ** 3;
    const found = analyseGasTest({
      startPa: absolute(100),
      endPa: absolute(90),
      startC: 20,
      endC: 20,
      resolutionPa: UNITS.psi.factor,
      minutes: 4,
      volumeM3: 10 * cubicFoot,
    });
    expect((found.freeAirM3PerMinute ?? 0) / cubicFoot).toBeCloseTo(1.7007, 3);
    expect(found.lostPaPerMinute).toBeCloseTo(2.5 * UNITS.psi.factor, 6);
    expect(found.smallestPaPerMinute).toBeCloseTo(0.5 * UNITS.psi.factor, 6);
  });

  test('without a volume there is no free air', () => {
    expect(
      analyseGasTest({ ...cooling, endPa: absolute(140), volumeM3: null }).freeAirM3PerMinute,
    ).toBeNull();
  });

  test('a tight circuit is never called leaking, whatever the temperature does', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -30, max: 60, noNaN: true }),
        fc.double({ min: -30, max: 60, noNaN: true }),
        fc.double({ min: 2e5, max: 3e6, noNaN: true }),
        (startC, endC, startPa) => {
          const endPa = (startPa * (endC + 273.15)) / (startC + 273.15);
          expect(analyseGasTest({ ...cooling, startPa, endPa, startC, endC }).verdict).toBe('tight');
        },
      ),
    );
  });
});

describe('a test with a pump kit on liquid', () => {
  const kit = { startPa: 103_000, endPa: 103_000, startC: 20, endC: 20, resolutionPa: 1000 };
  test.each([
    ['nothing moved', {}, 'tight'],
    ['two steps lost', { endPa: 101_000 }, 'tight'],
    ['more than two steps lost', { endPa: 100_900 }, 'leak'],
    ['risen', { endPa: 105_100 }, 'cannot-tell'],
    ['cooled by three kelvin, nothing lost', { endC: 17 }, 'tight'],
    ['cooled by more', { endC: 16.9 }, 'cannot-tell'],
    ['warmed by more, lost', { endC: 23.1, endPa: 90_000 }, 'cannot-tell'],
  ] as const)('%s: %s', (_what, change, verdict) => {
    expect(analyseLiquidTest({ ...kit, ...change }).verdict).toBe(verdict);
  });

  test('says what was lost', () => {
    expect(analyseLiquidTest({ ...kit, endPa: 100_000 })).toMatchObject({ lostPa: 3000, steady: true });
  });
});

describe('a ram that creeps', () => {
  const ram = { boreM: 0.1, rodM: 0, driftM: 0.012, stepM: 0.001, columnM: 0.8, cooledK: 0, minutes: 10 };

  /** Area of a 4-inch bore: 12.566 in² in cylinder tables; an inch in ten minutes is 1.2566 in³ a minute. */
  test('loses its area times how far it crept', () => {
    const inch = toSi(1, 'in');
    const found = analyseRamTest({ ...ram, boreM: 4 * inch, driftM: inch, stepM: 0.1 * inch });
    expect(found.verdict).toBe('leak');
    expect(found.lostM3PerMinute / inch ** 3).toBeCloseTo(1.2566, 4);
    expect(found.smallestM3PerMinute / inch ** 3).toBeCloseTo(0.12566, 5);
  });

  /** Rod-side area of a 4-inch bore with a 2-inch rod: 9.425 in² in cylinder tables. */
  test('with the load on the rod side, the rod’s area is taken off', () => {
    const inch = toSi(1, 'in');
    const found = analyseRamTest({ ...ram, boreM: 4 * inch, rodM: 2 * inch, driftM: inch });
    expect(found.lostM3PerMinute / inch ** 3).toBeCloseTo(0.9425, 4);
  });

  test.each([
    ['crept', {}, 'leak'],
    ['crept by the step', { driftM: 0.001 }, 'tight'],
    ['crept by what the cooling oil explains', { driftM: 0.0056, cooledK: 10 }, 'tight'],
    ['crept by more than that', { driftM: 0.0067, cooledK: 10 }, 'leak'],
    ['crept by less than the oil cooled', { driftM: 0.001, cooledK: 10 }, 'cannot-tell'],
    ['warmed oil hid a creep', { driftM: 0, cooledK: -10 }, 'leak'],
  ] as const)('%s: %s', (_what, change, verdict) => {
    expect(analyseRamTest({ ...ram, ...change }).verdict).toBe(verdict);
  });

  test('cooling oil shortens its column by seven parts in ten thousand a kelvin', () => {
    expect(analyseRamTest({ ...ram, cooledK: 10 }).cooledM).toBeCloseTo(0.0056, 6);
  });
});
