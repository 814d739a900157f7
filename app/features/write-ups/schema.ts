import { z } from 'zod';
import { WRITE_UP_STATES } from '#app/domain/write-ups/write-up-state.ts';

const MOST_LETTERS = 50_000;
export const STARTING_BODY = `### What it did

### What we found

### Why it failed

### What fixed it

### How we proved it

### What to look for next time
`;

export const writeUpSchema = z.object({
  title: z
    .string({ error: 'Give the note a title.' })
    .trim()
    .min(1, 'Give the note a title.')
    .max(190, 'Use at most 190 characters.'),
  body: z
    .string({ error: 'Write the note.' })
    .transform((text) => text.replaceAll('\r\n', '\n').trim())
    .refine((text) => text !== '', 'Write the note.')
    .refine(
      (text) => text.length <= MOST_LETTERS,
      `Use at most ${MOST_LETTERS.toLocaleString('en-GB')} characters.`,
    ),
  photos: z.array(z.coerce.number().int().positive()).max(60, 'Pick at most 60 photos.').default([]),
  version: z.coerce.number().int().positive().optional().catch(undefined),
});
export type WriteUpInput = z.infer<typeof writeUpSchema>;

export const wordsSchema = z.object({
  words: z
    .string({ error: 'Write why.' })
    .trim()
    .min(1, 'Write why.')
    .max(5000, 'Use at most 5,000 characters.'),
});

export const writeUpListSchema = z.object({
  q: z.string().max(5000).catch(''),
  state: z.enum(WRITE_UP_STATES).optional().catch(undefined),
  page: z.coerce.number().int().min(1).max(10_000).catch(1),
});
export type WriteUpListInput = z.infer<typeof writeUpListSchema>;

export function parseWriteUpList(params: URLSearchParams): WriteUpListInput {
  const given = Object.fromEntries([...params].filter(([, value]) => value !== ''));
  return writeUpListSchema.parse({ q: '', page: 1, ...given });
}
