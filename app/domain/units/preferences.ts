import type { UnitId } from './units.ts';

export type Scheme = 'system' | 'daylight' | 'lamp';
export type PreferredUnits = { pressure: UnitId; temperature: UnitId; mass: UnitId; volume: UnitId };
export type Preferences = { units?: Partial<PreferredUnits> };

const USUAL: PreferredUnits = { pressure: 'bar', temperature: 'C', mass: 'g', volume: 'l' };

/** The units a person works in; what they have not chosen is bar, °C, g and l. */
export function preferredUnits(preferences: Preferences): PreferredUnits {
  return { ...USUAL, ...preferences.units };
}
