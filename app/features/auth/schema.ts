import { z } from 'zod';

/** bcrypt silently cuts after 72 bytes, so longer passwords are refused. */
const MAX_PASSWORD_BYTES = 72;

export const emailField = z
  .string({ error: 'Write your e-mail address.' })
  .trim()
  .toLowerCase()
  .min(1, 'Write your e-mail address.')
  .max(190, 'This address is too long.')
  .regex(/^[^\s@]+@[^\s@]+\.[^\s@]+$/, 'This does not look like an e-mail address.');

export const newPasswordField = z
  .string({ error: 'Choose a password.' })
  .min(10, 'Use at least 10 characters.')
  .refine(
    (value) => new TextEncoder().encode(value).length <= MAX_PASSWORD_BYTES,
    'This password is too long: 72 bytes at most.',
  );

export const signInSchema = z.object({
  email: emailField,
  password: z
    .string({ error: 'Write your password.' })
    .min(1, 'Write your password.')
    .max(1000, 'This password is too long.'),
});

export const newPasswordSchema = z
  .object({ password: newPasswordField, again: z.string().default('') })
  .refine(({ password, again }) => password === again, {
    path: ['again'],
    message: 'The two passwords differ.',
  });
