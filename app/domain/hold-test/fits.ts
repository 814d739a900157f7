import { leastSquares } from './least-squares.ts';

export type Model = { rss: number; bic: number; fitted: number[] };
export type Models = {
  flat: Model;
  rising: Model & { slope: number; slopeError: number };
  levelling: Levelling | null;
  /** The best of those that have levelled out by the end of the test. */
  levelled: Levelling | null;
  both: Both | null;
  best: Model;
};

/** The three ways in which a vacuum may run, each fitted to the readings. */
export function fitModels(
  seconds: number[],
  pressures: number[],
  airPa: number,
  resolutionPa: number,
): Models {
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
export function fitRising(
  seconds: number[],
  pressures: number[],
  airPa: number,
  scored: Score,
): Models['rising'] {
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

export type Levelling = Model & { plateauPa: number; tauSeconds: number };
export type Both = Model & { slope: number; slopeError: number };

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
