import { annualizingRate, gramsLostPerYear, rollingAverageRate } from './leak-rate.ts';

const DAY_MS = 24 * 60 * 60_000;
const YEAR_DAYS = 365;

/** What the book says of one circuit, oldest first. */
export type CircuitEvent = { kind: 'charged' | 'recovered'; grams: number; at: Date };

export type LeakEstimate = {
  /** Per cent of the plate a year by the newest addition; null without a plate or an addition before it. */
  annualizing: number | null;
  /** Per cent of the plate added over the past 365 days, or since the newest repair if that is later. */
  rolling: number | null;
  gramsPerYear: number | null;
  /** Additions that no repair of the circuit came before since the addition before them. */
  toppedUp: { grams: number; at: string }[];
};

/**
 * What a circuit's additions say of its leaks. What was recovered and put back is no addition, and neither is the first
 * fill on record. Null when nothing was ever added.
 */
export function leakEstimate(
  events: readonly CircuitEvent[],
  repairs: readonly Date[],
  plateGrams: number | null,
  now: Date,
): LeakEstimate | null {
  const additions = additionsOf(events);
  const newest = additions.at(-1);
  if (!newest) return null;
  const lastRepair = Math.max(...repairs.map((at) => at.getTime()), Number.NEGATIVE_INFINITY);
  const from = Math.max(now.getTime() - YEAR_DAYS * DAY_MS, lastRepair);
  const counted = additions
    .filter(({ at, days }) => days !== null && at.getTime() >= from)
    .map(({ grams }) => grams);
  const { days } = newest;
  return {
    annualizing: plateGrams && days ? annualizingRate(newest.grams, plateGrams, days) : null,
    rolling: plateGrams ? rollingAverageRate(counted, plateGrams) : null,
    gramsPerYear: days ? gramsLostPerYear(newest.grams, days) : null,
    toppedUp: additions
      .filter(({ at, since }) => since !== null && !repairs.some((repair) => repair <= at && repair > since))
      .map(({ grams, at }) => ({ grams, at: at.toISOString() })),
  };
}

type Addition = { grams: number; at: Date; since: Date | null; days: number | null };

function additionsOf(events: readonly CircuitEvent[]): Addition[] {
  const additions: Addition[] = [];
  let takenOut = 0;
  let since: Date | null = null;
  for (const { kind, grams, at } of events) {
    if (kind === 'recovered') {
      takenOut += grams;
      continue;
    }
    const days = since ? (at.getTime() - since.getTime()) / DAY_MS : null;
    if (grams > takenOut) additions.push({ grams: grams - takenOut, at, since, days });
    takenOut = 0;
    since = at;
  }
  return additions;
}
