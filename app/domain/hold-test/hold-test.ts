import { airPressurePa } from '../atmosphere/atmosphere.ts';
import { waterVapourPa } from '../water/vapour-pressure.ts';
import { leastSquares } from './least-squares.ts';

/** A gauge reading: minutes since the valve was shut, absolute pressure in Pa. */
export type Sample = { minutes: number; pressurePa: number };

export type HoldTest = {
  samples: readonly Sample[];
  resolutionPa: number;
  volumeM3: number;
  ambientC: number;
  altitudeM: number;
};

export type HoldVerdict = 'tight' | 'moisture' | 'leak' | 'gross-leak' | 'cannot-tell';

export type HoldAnalysis = {
  verdict: HoldVerdict;
  /** Throughput of the leak in Pa·m³/s with a 95 % interval; null when no leak is read from the curve. */
  leakPaM3PerS: { estimate: number; low: number; high: number } | null;
  /** The smallest leak that this test with this gauge could have seen. */
  smallestLeakPaM3PerS: number;
  /** How far below the air outside any vacuum can go here: the local air pressure itself. */
  deepestVacuumPa: number;
  reasons: string[];
  /** The fitted pressure at each sample, for the drawing. */
  fitted: number[];
};

export const FEWEST_SAMPLES = 5;
const TRADE_TARGET_PA = 66.661;
const GROSS_SHARE = 0.3;
/** A rise is told from two readings, each rounded to the gauge's step: one and a half steps are sure to show. */
const ROUNDED_TWICE = 1.5;
const WARMING_K = 15;
const ZERO_C = 273.15;

/**
 * What a vacuum hold shows. Pressure rise method, Q = V·dp/dt (EN 1779, ISO 20485; from memory): air leaking in through a
 * small hole follows dp/dt = Q/V·(1 − (p/p_air)²) and keeps rising; water boiling off levels out at or below its vapour
 * pressure. Both are fitted and compared by the Bayesian information criterion. Null when there is too little to judge.
 */
export function analyseHoldTest(test: HoldTest): HoldAnalysis | null {
  const samples = [...test.samples].sort((one, other) => one.minutes - other.minutes);
  const seconds = samples.map(({ minutes }) => minutes * 60);
  const pressures = samples.map(({ pressurePa }) => pressurePa);
  const duration = (seconds.at(-1) ?? 0) - (seconds[0] ?? 0);
  if (samples.length < FEWEST_SAMPLES || duration <= 0) return null;
  const airPa = airPressurePa(test.altitudeM);
  const models = fitModels(seconds, pressures, airPa, test.resolutionPa);
  const noisePa = Math.max(Math.sqrt(models.best.rss / samples.length), test.resolutionPa / Math.sqrt(12));
  const visiblePa = Math.max(ROUNDED_TWICE * test.resolutionPa, 4 * noisePa * Math.sqrt(12 / samples.length));
  const smallest = (test.volumeM3 * visiblePa) / duration;
  const shared = { deepestVacuumPa: airPa, smallestLeakPaM3PerS: smallest };
  return { ...shared, ...judge({ test, seconds, pressures, airPa, models, visiblePa, duration, smallest }) };
}

type Model = { rss: number; bic: number; fitted: number[] };
type Models = {
  flat: Model;
  rising: Model & { slope: number; slopeError: number };
  levelling: Levelling | null;
  /** The best of those that have levelled out by the end of the test. */
  levelled: Levelling | null;
  both: Both | null;
  best: Model;
};

function fitModels(seconds: number[], pressures: number[], airPa: number, resolutionPa: number): Models {
  const count = seconds.length;
  const floor = count * (resolutionPa ** 2 / 12);
  const scored = (rss: number, parameters: number, fitted: number[]): Model => ({
    rss,
    fitted,
    bic: count * Math.log((rss + floor) / count) + parameters * Math.log(count),
  });
  const mean = pressures.reduce((sum, value) => sum + value, 0) / count;
  const flat = scored(
    squares(
      pressures,
      pressures.map(() => mean),
    ),
    1,
    pressures.map(() => mean),
  );
  const rising = fitRising(seconds, pressures, airPa, scored);
  const { levelling, levelled, both } = fitLevelling(seconds, pressures, scored);
  const best = [flat, rising, levelling, both]
    .filter((model) => model !== null)
    .reduce((x, y) => (y.bic < x.bic ? y : x));
  return { flat, rising, levelling, levelled, both, best };
}

type Score = (rss: number, parameters: number, fitted: number[]) => Model;

/** The laminar leak: p_air·atanh(p/p_air) rises in a straight line whose slope is Q/V. */
function fitRising(seconds: number[], pressures: number[], airPa: number, scored: Score): Models['rising'] {
  const straightened = pressures.map(
    (value) => airPa * Math.atanh(Math.min(Math.max(value, 0), 0.995 * airPa) / airPa),
  );
  const fit = leastSquares(
    seconds.map((time) => [1, time]),
    straightened,
  );
  const [start = 0, slope = 0] = fit?.coefficients ?? [];
  const fitted = seconds.map((time) => airPa * Math.tanh((start + slope * time) / airPa));
  return {
    ...scored(squares(pressures, fitted), 2, fitted),
    slope,
    slopeError: fit?.errors[1] ?? Number.POSITIVE_INFINITY,
  };
}

type Levelling = Model & { plateauPa: number; tauSeconds: number };
type Both = Model & { slope: number; slopeError: number };

/** The longest time constant, in lengths of the test, of a rise that has levelled out by its end. */
const LEVEL_BY_END = 0.6;

/** A rise that levels out, p = a − b·exp(−t/τ), alone and with a leak beside it; τ is searched, the rest is linear. */
function fitLevelling(
  seconds: number[],
  pressures: number[],
  scored: Score,
): Pick<Models, 'levelling' | 'levelled' | 'both'> {
  const first = seconds[0] ?? 0;
  const times = seconds.map((time) => time - first);
  const duration = times.at(-1) ?? 0;
  const decays = (tau: number) => times.map((time) => Math.exp(-time / tau));
  const alone = (tau: number): Levelling | null => {
    const decay = decays(tau);
    const fit = leastSquares(
      decay.map((value) => [1, value]),
      pressures,
    );
    if (!fit) return null;
    const [plateauPa = 0, drop = 0] = fit.coefficients;
    return {
      ...scored(
        fit.rss,
        3,
        decay.map((value) => plateauPa + drop * value),
      ),
      plateauPa,
      tauSeconds: tau,
    };
  };
  const mixed = (tau: number): Both | null => {
    const decay = decays(tau);
    const fit = leastSquares(
      decay.map((value, place) => [1, value, times[place] as number]),
      pressures,
    );
    if (!fit) return null;
    const [level = 0, drop = 0, slope = 0] = fit.coefficients;
    const fitted = decay.map((value, place) => level + drop * value + slope * (times[place] as number));
    return { ...scored(fit.rss, 4, fitted), slope, slopeError: fit.errors[2] ?? Number.POSITIVE_INFINITY };
  };
  return {
    levelling: bestTau(alone, 0.02 * duration, 3 * duration),
    levelled: bestTau(alone, 0.02 * duration, LEVEL_BY_END * duration),
    both: bestTau(mixed, 0.02 * duration, 3 * duration),
  };
}

/** The fit with the least squares over a time constant between two bounds: a coarse search, then a fine one around its best. */
function bestTau<M extends Model>(fitAt: (tau: number) => M | null, low: number, high: number): M | null {
  let [from, to] = [Math.log(low), Math.log(high)];
  let best: M | null = null;
  for (let round = 0; round < 4; round += 1) {
    const step = (to - from) / 16;
    let middle = from;
    let bestHere = Number.POSITIVE_INFINITY;
    for (let place = 0; place <= 16; place += 1) {
      const model = fitAt(Math.exp(from + place * step));
      if (!model || model.rss >= bestHere) continue;
      bestHere = model.rss;
      middle = from + place * step;
      if (!best || model.rss < best.rss) best = model;
    }
    [from, to] = [Math.max(middle - step, Math.log(low)), Math.min(middle + step, Math.log(high))];
  }
  return best;
}

function squares(one: readonly number[], other: readonly number[]): number {
  return one.reduce((sum, value, place) => sum + (value - (other[place] ?? 0)) ** 2, 0);
}

type Evidence = {
  test: HoldTest;
  seconds: number[];
  pressures: number[];
  airPa: number;
  models: Models;
  visiblePa: number;
  duration: number;
  smallest: number;
};

type Judgement = Pick<HoldAnalysis, 'verdict' | 'leakPaM3PerS' | 'reasons' | 'fitted'> & {
  smallestLeakPaM3PerS?: number;
};

/** A difference of the criterion that counts as strong (Kass and Raftery 1995). */
const STRONG = 6;

function judge(evidence: Evidence): Judgement {
  const { test, seconds, pressures, airPa, models, visiblePa, duration } = evidence;
  const { flat, rising, levelling, levelled, both } = models;
  const waterPa = waterVapourPa(test.ambientC);
  const last = Math.max(pressures.at(-1) ?? 0, pressures.at(-2) ?? 0);
  const fittedRise = (model: Model) => (model.fitted.at(-1) ?? 0) - (model.fitted[0] ?? 0);
  if (last > GROSS_SHARE * airPa) {
    const early = fitRising(...beginning(seconds, pressures, airPa), airPa, (rss, _parameters, fitted) => ({
      rss,
      bic: 0,
      fitted,
    }));
    return {
      verdict: 'gross-leak',
      leakPaM3PerS: interval(test.volumeM3, early.slope, early.slopeError),
      fitted: rising.fitted,
      reasons: ['The vacuum is largely lost before the test ends: the circuit is open to the air somewhere.'],
    };
  }
  const bends =
    levelling !== null && levelling.bic + STRONG < rising.bic && levelling.tauSeconds < 0.75 * duration;
  if (
    bends &&
    levelling.bic + 2 * STRONG < flat.bic &&
    fittedRise(levelling) < visiblePa &&
    fittedRise(levelling) > 0.6 * test.resolutionPa
  ) {
    return judgeLevel(test, levelling, waterPa, rising);
  }
  const rise = Math.max(fittedRise(rising), levelling ? fittedRise(levelling) : 0);
  if (rise < visiblePa && Math.min(rising.bic, levelling?.bic ?? 0) + STRONG < flat.bic) {
    return {
      verdict: 'cannot-tell',
      leakPaM3PerS: null,
      fitted: rising.fitted,
      reasons: [
        'The needle crept up, by less than this gauge can be trusted with: a leak, moisture or warming would look the same.',
        finer(test),
      ],
    };
  }
  if (rise < visiblePa || Math.min(rising.bic, levelling?.bic ?? 0) > flat.bic) {
    return {
      verdict: 'tight',
      leakPaM3PerS: null,
      fitted: flat.fitted,
      reasons: ['No rise that this gauge can show.', finer(test)],
    };
  }
  const start = rising.fitted[0] ?? 0;
  if (
    start > 0.93 * waterPa &&
    start < 1.07 * waterPa &&
    last < 1.6 * waterPa &&
    test.resolutionPa < 0.1 * waterPa
  ) {
    return {
      verdict: 'moisture',
      leakPaM3PerS: null,
      fitted: levelling?.fitted ?? rising.fitted,
      reasons: [
        `It stands at the vapour pressure of water from the start (${Math.round(waterPa)} Pa at ${test.ambientC} °C) and follows it as the circuit warms.`,
        'Pull it down again, warm, with a change of pump oil, then repeat the hold.',
      ],
    };
  }
  const warmed = (start * WARMING_K) / (test.ambientC + ZERO_C);
  if (rise < warmed) {
    return {
      verdict: 'tight',
      leakPaM3PerS: null,
      fitted: rising.fitted,
      smallestLeakPaM3PerS: Math.max(evidence.smallest, (test.volumeM3 * warmed) / duration),
      reasons: [
        `It rose by ${Math.round(rise)} Pa, no more than warming by ${WARMING_K} K would give; a leak within that cannot be told from it.`,
        'Take the temperature at both ends, or start from a deeper vacuum.',
      ],
    };
  }
  const leaksToo =
    both !== null &&
    levelling !== null &&
    both.bic + STRONG < levelling.bic &&
    both.slope > 4 * both.slopeError &&
    both.slope * duration > Math.max(visiblePa, 0.05 * rise);
  if (bends && levelling && !leaksToo) return judgeLevel(test, levelling, waterPa, rising);
  if (bends && leaksToo && both) {
    return {
      verdict: 'leak',
      leakPaM3PerS: interval(test.volumeM3, both.slope, both.slopeError),
      fitted: both.fitted,
      reasons: [
        'It bends at first, as gas or water boils off, then keeps rising in a straight line: something leaks in.',
      ],
    };
  }
  const underWater = last <= 1.1 * waterPa + test.resolutionPa;
  if (underWater && levelled && levelled.bic < rising.bic + STRONG) {
    return {
      verdict: 'cannot-tell',
      leakPaM3PerS: null,
      fitted: rising.fitted,
      reasons: [
        'It rises, but this gauge cannot tell a straight line from one that levels out: a leak and moisture would look the same.',
        finer(test),
      ],
    };
  }
  if (levelling && levelling.bic + STRONG < rising.bic && last < 1.1 * waterPa) {
    return {
      verdict: 'cannot-tell',
      leakPaM3PerS: null,
      fitted: levelling.fitted,
      reasons: ['It rises and bends, but the test ended before it levelled out. Hold longer.'],
    };
  }
  return {
    verdict: 'leak',
    leakPaM3PerS: interval(test.volumeM3, rising.slope, rising.slopeError),
    fitted: rising.fitted,
    reasons: ['It keeps rising in a straight line and does not level out.', finer(test)],
  };
}

function judgeLevel(
  test: HoldTest,
  levelling: Levelling,
  waterPa: number,
  rising: Models['rising'],
): Judgement {
  const { plateauPa, fitted } = levelling;
  if (plateauPa <= TRADE_TARGET_PA) {
    return {
      verdict: 'tight',
      leakPaM3PerS: null,
      fitted,
      reasons: [
        'It rises a little and levels out below 500 micron, as a dry circuit does that gives off some gas (common practice, no source).',
      ],
    };
  }
  if (plateauPa <= 1.08 * waterPa + test.resolutionPa) {
    return {
      verdict: 'moisture',
      leakPaM3PerS: null,
      fitted,
      reasons: [
        `It levels out at about ${Math.round(plateauPa)} Pa, at or below the vapour pressure of water at ${test.ambientC} °C (${Math.round(waterPa)} Pa): water, or refrigerant out of the oil.`,
        'Pull it down again, warm, then repeat the hold.',
      ],
    };
  }
  return {
    verdict: 'leak',
    leakPaM3PerS: interval(test.volumeM3, rising.slope, rising.slopeError),
    fitted: rising.fitted,
    reasons: [`It rises past the vapour pressure of water (${Math.round(waterPa)} Pa), so air comes in.`],
  };
}

/** The samples before half of the vacuum is lost, at least three. */
function beginning(seconds: number[], pressures: number[], airPa: number): [number[], number[]] {
  const until = pressures.findIndex((value) => value > 0.5 * airPa);
  const count = Math.max(until < 0 ? pressures.length : until + 1, 3);
  return [seconds.slice(0, count), pressures.slice(0, count)];
}

function interval(volumeM3: number, slope: number, error: number) {
  const spread = Number.isFinite(error) ? 2 * error : slope;
  return {
    estimate: volumeM3 * slope,
    low: volumeM3 * Math.max(slope - spread, 0),
    high: volumeM3 * (slope + spread),
  };
}

function finer({ resolutionPa }: HoldTest): string {
  return resolutionPa > 100
    ? 'A vacuum gauge in microns, dry nitrogen under pressure, or a detector would see much smaller leaks.'
    : 'A longer hold, dry nitrogen under pressure, a detector or dye would see smaller leaks.';
}

export type PressureTest = {
  startPa: number;
  endPa: number;
  startC: number;
  endC: number;
  resolutionPa: number;
};

/**
 * A test with dry nitrogen: the fall that is left after the gas law is taken out (p/T constant at constant volume).
 * Pressures are absolute.
 */
export function analysePressureTest({ startPa, endPa, startC, endC, resolutionPa }: PressureTest) {
  const expectedPa = (startPa * (endC + ZERO_C)) / (startC + ZERO_C);
  const lostPa = expectedPa - endPa;
  const verdict: 'tight' | 'leak' | 'cannot-tell' =
    lostPa > 2 * resolutionPa ? 'leak' : lostPa < -2 * resolutionPa ? 'cannot-tell' : 'tight';
  return { verdict, expectedPa, lostPa };
}
