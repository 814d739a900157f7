import { describe, expect, test } from 'vitest';
import { waterVapourPa } from '../water/vapour-pressure.ts';
import { analyseHoldTest, type HoldAnalysis, type HoldTest, type Sample } from './hold-test.ts';

/** Made-up holds, each of one kind; the expected verdict follows from how it was made. */
const MICRON = 0.133322;
const INCH = 3386.389;

function rounded(value: number, step: number): number {
  return Math.round(value / step) * step;
}

function samples(
  minutes: number,
  every: number,
  step: number,
  pressureAt: (seconds: number) => number,
): Sample[] {
  return Array.from({ length: Math.round(minutes / every) + 1 }, (_, place) => ({
    minutes: place * every,
    pressurePa: rounded(pressureAt(place * every * 60), step),
  }));
}

function analyse(made: Sample[], change: Partial<HoldTest> = {}): HoldAnalysis {
  const found = analyseHoldTest({
    samples: made,
    resolutionPa: MICRON,
    volumeM3: 0.004,
    ambientC: 20,
    altitudeM: 0,
    ...change,
  });
  if (!found) throw new Error('nothing to judge');
  return found;
}

const within = (found: HoldAnalysis, throughput: number) => {
  expect((found.leakPaM3PerS?.low ?? Number.POSITIVE_INFINITY) <= throughput * 1.001).toBe(true);
  expect((found.leakPaM3PerS?.high ?? 0) >= throughput * 0.999).toBe(true);
};

describe('what each kind of hold is called', () => {
  test('bends, then rises in a straight line: a leak of the straight part', () => {
    const slope = 0.05;
    const found = analyse(
      samples(40, 1, MICRON, (time) => 60 + 200 * (1 - Math.exp(-time / 180)) + slope * time),
    );
    expect(found.verdict).toBe('leak');
    expect((found.leakPaM3PerS?.estimate ?? 0) / (0.004 * slope)).toBeCloseTo(1, 1);
    within(found, 0.004 * slope);
    expect(found.reasons[0]).toContain('keeps rising');
    expect(found.fitted.at(-1)).toBeCloseTo(60 + 200 + slope * 2400, 0);
  });

  test('a bend with a straight part too small to see stays moisture', () => {
    const found = analyse(
      samples(40, 1, MICRON, (time) => 60 + 500 * (1 - Math.exp(-time / 180)) + 0.00002 * time),
    );
    expect(found.verdict).toBe('moisture');
    expect(found.leakPaM3PerS).toBeNull();
    expect(found.reasons.length).toBe(2);
  });

  test('levels out below 500 micron: tight, some gas given off', () => {
    const found = analyse(samples(30, 1, MICRON, (time) => 30 + 25 * (1 - Math.exp(-time / 240))));
    expect(found.verdict).toBe('tight');
    expect(found.reasons[0]).toContain('levels out below 500 micron');
  });

  test('levels out just above 500 micron: moisture', () => {
    const found = analyse(samples(30, 1, MICRON, (time) => 30 + 45 * (1 - Math.exp(-time / 240))));
    expect(found.verdict).toBe('moisture');
  });

  test('levels out beyond the vapour pressure of water: air, so a leak', () => {
    const water = waterVapourPa(5);
    const found = analyse(
      samples(30, 1, MICRON, (time) => 100 + 1.4 * water * (1 - Math.exp(-time / 300))),
      { ambientC: 5 },
    );
    expect(found.verdict).toBe('leak');
    expect(found.reasons[0]).toContain('past the vapour pressure of water');
    expect(found.leakPaM3PerS?.estimate).toBeGreaterThan(0);
  });

  test('levels out at the vapour pressure of water itself, a little over for the gauge: moisture', () => {
    const water = waterVapourPa(20);
    expect(
      analyse(samples(40, 1, MICRON, (time) => 100 + (water * 1.05 - 100) * (1 - Math.exp(-time / 300))))
        .verdict,
    ).toBe('moisture');
  });

  test('bends, and the test ends before it levels: cannot tell', () => {
    const found = analyse(samples(10, 0.5, MICRON, (time) => 60 + 1500 * (1 - Math.exp(-time / 900))));
    expect(found.verdict).toBe('cannot-tell');
    expect(found.reasons[0]).toContain('ended before it levelled');
    expect(found.leakPaM3PerS).toBeNull();
    expect(found.fitted[0]).toBeCloseTo(60, 0);
  });

  test('stands at the vapour pressure of water and follows it as the circuit warms: moisture', () => {
    const found = analyse(
      samples(20, 0.5, MICRON, (time) => waterVapourPa(20 + time / 400)),
      { ambientC: 20 },
    );
    expect(found.verdict).toBe('moisture');
    expect(found.reasons[0]).toContain('from the start');
    expect(found.leakPaM3PerS).toBeNull();
  });

  test('a straight rise from there is a leak once it is far past water', () => {
    const water = waterVapourPa(20);
    expect(analyse(samples(30, 1, MICRON, (time) => water + 2 * time)).verdict).toBe('leak');
  });

  test('rises by no more than warming gives: tight, and the smallest leak says so', () => {
    const found = analyse(samples(20, 1, MICRON, (time) => 300 + 0.01 * time));
    expect(found.verdict).toBe('tight');
    expect(found.reasons[0]).toContain('warming');
    /** 300 Pa · 15 K / 293.15 K in 4 l over 20 minutes. */
    expect(found.smallestLeakPaM3PerS).toBeCloseTo((0.004 * 300 * 15) / 293.15 / 1200, 5);
    expect(analyse(samples(20, 1, MICRON, (time) => 300 + 0.02 * time)).verdict).toBe('leak');
  });

  test('does not move: tight, and the smallest leak is one and a half steps', () => {
    const found = analyse(samples(10, 1, MICRON, () => 40));
    expect(found.verdict).toBe('tight');
    expect(found.smallestLeakPaM3PerS).toBeCloseTo((0.004 * 1.5 * MICRON) / 600, 12);
    expect(found.reasons[0]).toContain('No rise');
  });

  test('a coarse needle that creeps by less than it can be trusted with: cannot tell', () => {
    const found = analyse(
      samples(30, 1, 1, (time) => (time < 900 ? 3000 : 3000 + 0.5 * INCH)),
      { resolutionPa: 0.5 * INCH },
    );
    expect(found.verdict).toBe('cannot-tell');
    expect(found.reasons[0]).toContain('crept');
    expect(found.reasons[1]).toContain('microns');
  });

  test('a coarse needle that rises a few steps below water cannot tell straight from level', () => {
    const made = samples(20, 2, 0.25 * INCH, (time) => 100 + 2400 * (1 - Math.exp(-time / 500)));
    const found = analyse(made, { resolutionPa: 0.25 * INCH, ambientC: 30 });
    expect(found.verdict).toBe('cannot-tell');
    expect(found.leakPaM3PerS).toBeNull();
  });

  test('a straight rise with a fine gauge: a leak, and what would see smaller', () => {
    const found = analyse(samples(20, 1, MICRON, (time) => 40 + 0.1 * time));
    expect(found.verdict).toBe('leak');
    within(found, 0.0004);
    expect(found.leakPaM3PerS?.estimate).toBeCloseTo(0.0004, 6);
    expect(found.reasons).toEqual([
      'It keeps rising in a straight line and does not level out.',
      'A longer hold, dry nitrogen under pressure, a detector or dye would see smaller leaks.',
    ]);
  });

  test('most of the vacuum gone: gross, its size read from the beginning', () => {
    const airPa = 101_325;
    const slope = 120;
    const found = analyse(
      samples(30, 1, 10, (time) => airPa * Math.tanh((100 + slope * time) / airPa)),
      {
        resolutionPa: 10,
      },
    );
    expect(found.verdict).toBe('gross-leak');
    expect((found.leakPaM3PerS?.estimate ?? 0) / (0.004 * slope)).toBeCloseTo(1, 1);
    expect(found.reasons[0]).toContain('open to the air');
    expect(found.deepestVacuumPa).toBe(airPa);
  });

  test('a third of the air back is gross, a quarter is a leak', () => {
    const to = (share: number) => samples(20, 1, 10, (time) => 100 + (share * 101_325 * time) / 1200);
    expect(analyse(to(0.33), { resolutionPa: 10 }).verdict).toBe('gross-leak');
    expect(analyse(to(0.25), { resolutionPa: 10 }).verdict).toBe('leak');
  });
});

describe('how the readings are taken', () => {
  const rising = samples(20, 1, MICRON, (time) => 40 + 0.1 * time);

  test('in any order', () => {
    const shuffled = [...rising].sort((one, other) => ((one.minutes * 7) % 11) - ((other.minutes * 7) % 11));
    expect(analyse(shuffled)).toEqual(analyse(rising));
  });

  test('from any moment on', () => {
    const later = rising.map(({ minutes, pressurePa }) => ({ minutes: minutes + 55, pressurePa }));
    expect(analyse(later).verdict).toBe('leak');
    expect(analyse(later).leakPaM3PerS?.estimate).toBeCloseTo(0.0004, 6);
    const level = samples(40, 1, MICRON, (time) => 60 + 500 * (1 - Math.exp(-time / 180)));
    const lateLevel = level.map(({ minutes, pressurePa }) => ({ minutes: minutes + 55, pressurePa }));
    expect(analyse(lateLevel).verdict).toBe('moisture');
  });

  test('five are enough, four are not', () => {
    const one = { resolutionPa: MICRON, volumeM3: 0.004, ambientC: 20, altitudeM: 0 };
    expect(analyseHoldTest({ ...one, samples: rising.slice(0, 5) })).not.toBeNull();
    expect(analyseHoldTest({ ...one, samples: rising.slice(0, 4) })).toBeNull();
  });

  test('twice the volume is twice the leak, twice the time half the smallest', () => {
    const [once, twice] = [analyse(rising), analyse(rising, { volumeM3: 0.008 })];
    expect((twice.leakPaM3PerS?.estimate ?? 0) / (once.leakPaM3PerS?.estimate ?? 1)).toBeCloseTo(2, 9);
    const flat = (minutes: number) =>
      analyse(samples(minutes, minutes / 20, MICRON, () => 40)).smallestLeakPaM3PerS;
    expect(flat(10) / flat(20)).toBeCloseTo(2, 9);
  });
});
