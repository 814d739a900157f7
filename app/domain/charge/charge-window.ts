import { toSi } from '../units/units.ts';

/**
 * Running pressures of an R-134a cab circuit against the air outside, in psi on the gauge: US Army TM 5-3805-291-23-1,
 * WP 0018, table 1 (a loader). The manual calls them a guide only: weight is the only absolute measure of a charge.
 */
const PUBLISHED = [
  { ambientF: 70, low: [10, 20], high: [120, 190] },
  { ambientF: 80, low: [10, 25], high: [140, 210] },
  { ambientF: 90, low: [15, 30], high: [170, 240] },
  { ambientF: 100, low: [15, 30], high: [190, 270] },
  { ambientF: 110, low: [15, 30], high: [210, 300] },
] as const;

export const WINDOW_SOURCE = 'US Army TM 5-3805-291-23-1, WP 0018, table 1';

/** What is said beside it, and differs. Common practice, no source. */
export const COMMON_PRACTICE =
  'Common practice, no source: about 80 °F (27 °C), 40 to 50 psi on the low side and 170 to 210 psi on the high side while a small can is charged; high side about 2.2 to 2.5 times the air in °F. Where it differs from the table, neither is the maker’s figure.';

export type ChargeWindow = {
  lowPa: readonly [number, number];
  highPa: readonly [number, number];
  source: string;
};

export const WINDOW_FROM_C = 21.1;
export const WINDOW_TO_C = 43.3;

/**
 * The window of running gauge pressures in Pa at an air temperature in °C, straight between the rows of the table; for
 * another refrigerant or temperature an error, never a guess.
 */
export function chargeWindow(refrigerant: string, ambientC: number): ChargeWindow | { error: string } {
  if (refrigerant !== 'R-134a')
    return { error: `No published window for ${refrigerant} is kept here. Charge by weight.` };
  const ambientF = ambientC * 1.8 + 32;
  const above = PUBLISHED.findIndex((row) => row.ambientF >= ambientF - 0.1);
  const upper = PUBLISHED[above];
  const lower = PUBLISHED[Math.max(above - 1, 0)];
  if (!upper || !lower || ambientF < PUBLISHED[0].ambientF - 0.1) {
    return { error: `The table runs from 21 to 43 °C (70 to 110 °F) only. Charge by weight.` };
  }
  const share = upper === lower ? 0 : (ambientF - lower.ambientF) / (upper.ambientF - lower.ambientF);
  const between = (one: readonly [number, number], other: readonly [number, number]) =>
    [0, 1].map((end) => toSi((one[end] ?? 0) + share * ((other[end] ?? 0) - (one[end] ?? 0)), 'psi')) as [
      number,
      number,
    ];
  return {
    lowPa: between(lower.low, upper.low),
    highPa: between(lower.high, upper.high),
    source: WINDOW_SOURCE,
  };
}
