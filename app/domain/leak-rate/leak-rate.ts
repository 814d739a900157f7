/**
 * Leak rates in per cent of the full charge a year by the two methods of 40 CFR 82.152. They are the rule's own measures
 * for appliances of 50 lb and more of ozone-depleting refrigerant (40 CFR 84.106 takes them over for 15 lb and more of
 * HFC since 2026); cab air conditioning lies below every threshold. Local law comes first.
 */
export function annualizingRate(
  addedKg: number,
  fullChargeKg: number,
  daysSinceLastAddition: number,
): number {
  return (addedKg / fullChargeKg) * (365 / Math.min(daysSinceLastAddition, 365)) * 100;
}

/** Additions of the past 365 days, or since the leaks were last repaired if that is more recent. */
export function rollingAverageRate(additionsKg: readonly number[], fullChargeKg: number): number {
  return (additionsKg.reduce((sum, kg) => sum + kg, 0) / fullChargeKg) * 100;
}

/** Grams lost a year from what was lost over some days. */
export function gramsLostPerYear(lostGrams: number, days: number): number {
  return (lostGrams / days) * 365;
}

/** The thresholds of 40 CFR 82.157(c)(2) in per cent a year; a rate must lie over one, not on it. */
export const THRESHOLDS = [
  { use: 'Comfort cooling', percent: 10 },
  { use: 'Other appliances', percent: 10 },
  { use: 'Commercial refrigeration', percent: 20 },
  { use: 'Industrial process refrigeration', percent: 30 },
] as const;
