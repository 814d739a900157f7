import { z } from 'zod';
import { parseTypedNumber, toSi, type UnitId } from '#app/domain/units/units.ts';

/** A number as typed in a form, between two bounds. */
export function number(least: number, most: number, words: string) {
  return typedNumber(least, most, words).transform((typed) => parseTypedNumber(typed) ?? 0);
}

/** A number between two bounds that stays as it was typed. */
export function typedNumber(least: number, most: number, words: string) {
  return z
    .string()
    .trim()
    .max(40, 'This is too long for a number.')
    .default('')
    .refine((typed) => parseTypedNumber(typed) !== null, 'Write this as a number, like 12.5.')
    .refine((typed) => {
      const value = parseTypedNumber(typed) ?? least;
      return value >= least && value <= most;
    }, words);
}

export const TEMPERATURE_UNITS = ['C', 'F'] as const satisfies UnitId[];
export const ALTITUDE_UNITS = ['m', 'ft'] as const satisfies UnitId[];

/** The unit that stands beside a field; the usual one where a form or a call leaves it out. */
export function unitOf<U extends UnitId>(units: readonly [U, ...U[]]) {
  return z.enum(units, { error: 'Choose a unit.' }).default(units[0] as never);
}

const ZERO_C = 273.15;

export function celsius(value: number, unit: (typeof TEMPERATURE_UNITS)[number]): number {
  return unit === 'C' ? value : Number((toSi(value, unit) - ZERO_C).toFixed(2));
}
