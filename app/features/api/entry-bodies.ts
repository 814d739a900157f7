import { z } from 'zod';
import { ENTRY_SCHEMAS, type EntryKind } from '#app/features/cases/schema.ts';

const numberOrText = z.union([z.string(), z.number().transform(String)]);

/** A new entry on a case: what kind it is and its fields, as the forms name them; numbers also as numbers. */
export const newEntryBody = z.object({
  entry: z.enum(Object.keys(ENTRY_SCHEMAS) as [EntryKind, ...EntryKind[]], {
    error: 'Say what kind of entry this is.',
  }),
  fields: z.record(z.string(), numberOrText, { error: 'Give the fields of the entry.' }),
  override: z
    .string()
    .trim()
    .max(5000)
    .default('')
    .meta({ description: 'A lead’s written reason to pass a gate all the same.' }),
});

export const holdTestEntryBody = z.object({
  samples: z
    .array(z.object({ minutes: z.number(), reading: z.number() }), { error: 'Give the samples.' })
    .max(2000),
  gauge: z.enum(['micron', 'mbar', 'inHg']),
  step: z.number(),
  litres: z.number(),
  ambient: z.number(),
  altitude: z.number().default(0),
  note: z.string().default(''),
  override: z.string().trim().max(5000).default(''),
});
