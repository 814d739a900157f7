import { z } from 'zod';
import { REFRIGERANTS } from '#app/domain/refrigerant/saturation.ts';
import {
  CYLINDER_KINDS,
  MOVEMENT_KINDS,
  type MovementKind,
  NEEDS_MACHINE,
} from '#app/domain/refrigerant-book/book.ts';
import { isUnit, parseTypedNumber, toSi, UNITS } from '#app/domain/units/units.ts';

const MOST_GRAMS = 1_000_000;

export const cylinderSchema = z.object({
  label: z
    .string({ error: 'Write the number on it.' })
    .trim()
    .min(1, 'Write the number on it.')
    .max(60, 'Use at most 60 characters.'),
  refrigerant: z.enum(REFRIGERANTS as [string, ...string[]], { error: 'Choose the refrigerant.' }),
  kind: z.enum(CYLINDER_KINDS, { error: 'Say what it is.' }),
});

export const movementSchema = z
  .object({
    kind: z.enum(MOVEMENT_KINDS, { error: 'Say what happened.' }),
    cylinder: z.coerce.number({ error: 'Choose the cylinder.' }).int().positive('Choose the cylinder.'),
    amount: z.string().trim().max(40, 'This is too long for a number.').default(''),
    unit: z
      .string()
      .default('g')
      .refine((unit) => isUnit(unit) && UNITS[unit].quantity === 'mass', 'Choose a unit.'),
    machine: z.string().trim().max(60).default(''),
    circuit: z.string().trim().max(190).default(''),
    certificate: z.string().trim().max(190, 'Use at most 190 characters.').default(''),
    note: z.string().trim().max(5000, 'Use at most 5,000 characters.').default(''),
  })
  .refine(({ kind, machine }) => !NEEDS_MACHINE[kind] || machine !== '', {
    path: ['machine'],
    message: 'Which machine? Write its number.',
  })
  .refine(({ kind, amount }) => kind === 'opened' || parseTypedNumber(amount) !== null, {
    path: ['amount'],
    message: 'Write the weight as a number.',
  })
  .refine(({ kind, amount, unit }) => withinWeights(kind, gramsOf(amount, unit)), {
    path: ['amount'],
    message: 'Use 1 g to 1,000 kg.',
  });
export type MovementInput = z.infer<typeof movementSchema>;

/** An empty cylinder weighs nothing; an opening has no weight. */
function withinWeights(kind: MovementKind, grams: number): boolean {
  if (kind === 'opened') return true;
  return grams >= (kind === 'weighed' ? 0 : 1) && grams <= MOST_GRAMS;
}

/** Whole grams of a typed weight. */
export function gramsOf(typed: string, unit: string): number {
  const value = parseTypedNumber(typed);
  return value === null || !isUnit(unit) ? 0 : Math.round(toSi(value, unit) * 1000);
}

const day = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}$/)
  .refine((text) => !Number.isNaN(Date.parse(text)))
  .optional()
  .catch(undefined);

/** The address of the book, its record and its export. */
export const bookSchema = z.object({
  from: day,
  to: day,
  machine: z.string().trim().max(60).optional().catch(undefined),
  person: z.coerce.number().int().positive().optional().catch(undefined),
  page: z.coerce.number().int().min(1).max(10_000).catch(1),
});
export type BookInput = z.infer<typeof bookSchema>;

export function parseBook(params: URLSearchParams): BookInput {
  return bookSchema.parse({
    page: 1,
    ...Object.fromEntries([...params].filter(([, value]) => value !== '')),
  });
}
