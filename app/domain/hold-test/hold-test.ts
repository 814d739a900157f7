import { airPressurePa } from '../atmosphere/atmosphere.ts';
import { waterVapourPa } from '../water/vapour-pressure.ts';
import { fitModels, fitRising, type Levelling, type Model, type Models } from './fits.ts';

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
