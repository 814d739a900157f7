import { z } from 'zod';
import { ROLES } from '#app/domain/permissions/actor.ts';
import { parseTypedNumber } from '#app/domain/units/units.ts';
import { emailField } from '#app/features/auth/schema.ts';

const nameField = z
  .string({ error: 'Write the name.' })
  .trim()
  .min(1, 'Write the name.')
  .max(100, 'Use at most 100 characters.');
const roleField = z.enum(ROLES, { error: 'Choose a role.' });

export const addPersonSchema = z.object({ name: nameField, email: emailField, role: roleField });
export const changePersonSchema = z.object({ name: nameField, role: roleField });
export const yardSchema = z.object({
  name: z
    .string({ error: 'Write the yard’s name.' })
    .trim()
    .min(1, 'Write the yard’s name.')
    .max(100, 'Use at most 100 characters.'),
  altitude: z
    .string()
    .trim()
    .default('')
    .transform((typed) => (typed === '' ? 0 : parseTypedNumber(typed)))
    .refine((metres) => metres !== null && metres >= -500 && metres <= 6000, 'Use −500 to 6,000 m.')
    .transform((metres) => Math.round(metres ?? 0)),
});
