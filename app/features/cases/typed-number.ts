import { z } from 'zod';
import { parseTypedNumber } from '#app/domain/units/units.ts';

/** A number as typed in a form, between two bounds. */
export function number(least: number, most: number, words: string) {
  return z
    .string()
    .trim()
    .default('')
    .refine((typed) => parseTypedNumber(typed) !== null, 'Write this as a number, like 12.5.')
    .transform((typed) => parseTypedNumber(typed) ?? 0)
    .refine((value) => value >= least && value <= most, words);
}
