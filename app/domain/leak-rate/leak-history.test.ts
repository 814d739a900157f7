import { describe, expect, test } from 'vitest';
import { type CircuitEvent, leakEstimate } from './leak-history.ts';

const NOW = new Date('2026-12-01T12:00:00Z');
const daysAgo = (days: number) => new Date(NOW.getTime() - days * 24 * 60 * 60_000);
const charged = (grams: number, days: number): CircuitEvent => ({
  kind: 'charged',
  grams,
  at: daysAgo(days),
});
const recovered = (grams: number, days: number): CircuitEvent => ({
  kind: 'recovered',
  grams,
  at: daysAgo(days),
});

describe('what a circuit’s additions say of its leaks', () => {
  test('nothing in the book says nothing', () => {
    expect(leakEstimate([], [], 900, NOW)).toBeNull();
    expect(leakEstimate([recovered(400, 10)], [], 900, NOW)).toBeNull();
  });

  test('the first fill alone gives no rate', () => {
    expect(leakEstimate([charged(900, 100)], [], 900, NOW)).toEqual({
      annualizing: null,
      rolling: 0,
      gramsPerYear: null,
      toppedUp: [],
    });
  });

  /** 150 g in 120 days of a charge of 900 g: the mobile example of tests/reference/leak-rate.json. */
  test('an addition, by both methods of 40 CFR 82.152', () => {
    const found = leakEstimate([charged(900, 240), charged(150, 120)], [], 900, NOW);
    expect(found?.annualizing).toBeCloseTo(50.694, 2);
    expect(found?.rolling).toBeCloseTo(16.667, 2);
    expect(found?.gramsPerYear).toBeCloseTo(456.25, 2);
    expect(found?.toppedUp).toEqual([{ grams: 150, at: daysAgo(120).toISOString() }]);
  });

  test('what came out and went back is no addition', () => {
    const events = [charged(900, 240), recovered(700, 101), charged(900, 100)];
    expect(leakEstimate(events, [], 900, NOW)?.toppedUp).toEqual([
      { grams: 200, at: daysAgo(100).toISOString() },
    ]);
    const whole = [charged(900, 240), recovered(900, 101), charged(900, 100)];
    expect(leakEstimate(whole, [], 900, NOW)?.toppedUp).toEqual([]);
  });

  test('an addition after a repair is no topping up, one before it is', () => {
    const events = [charged(900, 240), charged(150, 120), charged(100, 20)];
    expect(leakEstimate(events, [daysAgo(130)], 900, NOW)?.toppedUp.map(({ grams }) => grams)).toEqual([100]);
    expect(leakEstimate(events, [daysAgo(10)], 900, NOW)?.toppedUp.map(({ grams }) => grams)).toEqual([
      150, 100,
    ]);
    expect(leakEstimate(events, [daysAgo(120), daysAgo(20)], 900, NOW)?.toppedUp).toEqual([]);
  });

  test('the rolling average counts a year at most, and starts anew at a repair', () => {
    const events = [charged(900, 800), charged(90, 400), charged(90, 300), charged(90, 100)];
    expect(leakEstimate(events, [], 900, NOW)?.rolling).toBeCloseTo(20, 6);
    expect(leakEstimate(events, [daysAgo(200)], 900, NOW)?.rolling).toBeCloseTo(10, 6);
  });

  test('without a plate there are grams but no per cent', () => {
    expect(leakEstimate([charged(900, 200), charged(73, 100)], [], null, NOW)).toMatchObject({
      annualizing: null,
      rolling: null,
      gramsPerYear: 73 * 3.65,
    });
  });
});
