import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitModels } from './fits.ts';
import { leastSquares } from './least-squares.ts';

const AIR = 101_325;
const times = Array.from({ length: 41 }, (_, place) => place * 60);
const modelsOf = (pressureAt: (seconds: number) => number, at = times) =>
  fitModels(at, at.map(pressureAt), AIR, 0.1);

describe('least squares', () => {
  /** Anscombe, The American Statistician 27 (1973): y = 3.00 + 0.500 x, errors 1.125 and 0.118, residual squares 13.76. */
  test('Anscombe’s first set, with its published errors', () => {
    const x = [10, 8, 13, 9, 11, 14, 6, 4, 12, 7, 5];
    const y = [8.04, 6.95, 7.58, 8.81, 8.33, 9.96, 7.24, 4.26, 10.84, 4.82, 5.68];
    const found = leastSquares(
      x.map((value) => [1, value]),
      y,
    );
    expect(found?.coefficients[0]).toBeCloseTo(3, 2);
    expect(found?.coefficients[1]).toBeCloseTo(0.5, 3);
    expect(found?.errors[0]).toBeCloseTo(1.125, 3);
    expect(found?.errors[1]).toBeCloseTo(0.118, 3);
    expect(found?.rss).toBeCloseTo(13.76, 2);
  });

  test('no more unknowns than the readings can tell', () => {
    expect(
      leastSquares(
        [
          [1, 2],
          [1, 2],
          [1, 2],
        ],
        [1, 2, 3],
      ),
    ).toBeNull();
    expect(leastSquares([], [])?.coefficients ?? []).toEqual([]);
  });

  test('three unknowns exactly, in whatever order they lead', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -9, max: 9 }),
        fc.integer({ min: -9, max: 9 }),
        fc.integer({ min: -9, max: 9 }),
        (a, b, c) => {
          const rows = [-2, -1, 0, 1, 2, 3].map((x) => [x * x, x, 1]);
          const y = rows.map(([square = 0, x = 0]) => a * square + b * x + c);
          const found = leastSquares(rows, y);
          expect(found?.coefficients[0]).toBeCloseTo(a, 6);
          expect(found?.coefficients[1]).toBeCloseTo(b, 6);
          expect(found?.coefficients[2]).toBeCloseTo(c, 6);
          expect(found?.rss).toBeCloseTo(0, 6);
        },
      ),
    );
  });

  test('a column that begins with nothing is turned, not given up', () => {
    const found = leastSquares(
      [
        [0, 1],
        [1, 0],
        [1, 1],
      ],
      [3, 2, 5],
    );
    expect(found?.coefficients[0]).toBeCloseTo(2, 9);
    expect(found?.coefficients[1]).toBeCloseTo(3, 9);
  });
});

describe('the ways a vacuum may run', () => {
  test('flat: its mean, and no other way is better', () => {
    const { flat, best } = modelsOf((time) => 50 + (time % 120 === 0 ? 0.01 : -0.01));
    expect(flat.fitted[0]).toBeCloseTo(50, 2);
    expect(best.fitted).toEqual(flat.fitted);
  });

  test('a leak: its slope, straight through the turn towards the air outside', () => {
    const { rising, best } = modelsOf((time) => AIR * Math.tanh((200 + 30 * time) / AIR));
    expect(rising.slope).toBeCloseTo(30, 6);
    expect(rising.slopeError).toBeLessThan(1e-6);
    expect(rising.fitted.at(-1)).toBeCloseTo(AIR * Math.tanh((200 + 30 * 2400) / AIR), 3);
    expect(best.fitted).toEqual(rising.fitted);
  });

  test('levelling out: its plateau and time constant', () => {
    const { flat, levelling, levelled, best } = modelsOf((time) => 1600 - 1500 * Math.exp(-time / 300));
    expect(levelling?.plateauPa).toBeCloseTo(1600, 0);
    expect((levelling?.tauSeconds ?? 0) / 300).toBeCloseTo(1, 2);
    expect(levelling?.fitted[0]).toBeCloseTo(100, 0);
    expect(levelling?.fitted[5]).toBeCloseTo(1600 - 1500 * Math.exp(-1), 0);
    expect((levelled?.tauSeconds ?? 0) / (levelling?.tauSeconds ?? 1)).toBeCloseTo(1, 3);
    expect(best.rss).toBeLessThan(0.01 * flat.rss);
  });

  test('a slow one levels out of sight, so what has levelled by the end fits worse', () => {
    const { levelling, levelled } = modelsOf((time) => 6000 - 5900 * Math.exp(-time / 4000));
    expect((levelling?.tauSeconds ?? 0) / 4000).toBeCloseTo(1, 1);
    expect(levelled?.tauSeconds).toBeLessThanOrEqual(0.6 * 2400 + 1);
    expect(levelled?.rss).toBeGreaterThan(10 * (levelling?.rss ?? Number.POSITIVE_INFINITY));
  });

  test('a quick one', () => {
    const { levelling } = modelsOf((time) => 400 - 300 * Math.exp(-time / 70));
    expect((levelling?.tauSeconds ?? 0) / 70).toBeCloseTo(1, 2);
  });

  test('both at once: the slope of the leak beside the bend', () => {
    const { both, best } = modelsOf((time) => 500 - 400 * Math.exp(-time / 200) + 0.3 * time);
    expect(both?.slope).toBeCloseTo(0.3, 3);
    expect(both?.slopeError).toBeLessThan(0.001);
    expect(both?.fitted.at(-1)).toBeCloseTo(500 + 0.3 * 2400, 0);
    expect(best.fitted).toEqual(both?.fitted);
  });

  test('the clock may start at any time', () => {
    const shifted = times.map((time) => time + 9000);
    const { levelling } = modelsOf((time) => 1600 - 1500 * Math.exp(-(time - 9000) / 300), shifted);
    expect(levelling?.plateauPa).toBeCloseTo(1600, 0);
    expect((levelling?.tauSeconds ?? 0) / 300).toBeCloseTo(1, 2);
  });

  test('a parameter more is paid for: log n each', () => {
    const { flat, rising } = modelsOf(() => 50);
    expect(rising.bic - flat.bic).toBeCloseTo(Math.log(times.length), 6);
  });
});
