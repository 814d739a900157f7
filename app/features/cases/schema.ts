import { z } from 'zod';
import { CERTAINTIES, CHARGE_KINDS, METHOD_OUTCOMES, PROOF_VERDICTS } from '#app/domain/chain/evidence.ts';
import { isUnit, parseTypedNumber, type Quantity, UNITS } from '#app/domain/units/units.ts';

const MAX_NOTE = 20_000;

export const longText = z
  .string({ error: 'Write this as text.' })
  .trim()
  .max(MAX_NOTE, `Use at most ${MAX_NOTE.toLocaleString('en-GB')} characters.`)
  .default('');
export const shortText = z
  .string({ error: 'Write this as text.' })
  .trim()
  .max(190, 'Use at most 190 characters.')
  .default('');
const choice = z.string().trim().max(60).default('');
const versionField = z.coerce.number().int().positive().optional().catch(undefined);

/** A typed number with its unit; empty stays empty. Answers the text as typed beside the number. */
function measured(quantities: readonly Quantity[], { required }: { required: boolean }) {
  return {
    value: z
      .string()
      .trim()
      .max(40, 'This is too long for a number.')
      .default('')
      .refine((text) => !required || text !== '', 'Write the number you read.')
      .refine((text) => text === '' || parseTypedNumber(text) !== null, 'Write this as a number, like 12.5.'),
    unit: z
      .string()
      .default('')
      .refine(
        (unit) => (!required && unit === '') || (isUnit(unit) && quantities.includes(UNITS[unit].quantity)),
        'Choose a unit.',
      ),
  };
}

const hoursField = z
  .string()
  .trim()
  .default('')
  .refine((text) => text === '' || parseTypedNumber(text) !== null, 'Write the hours as a number.')
  .transform((text) => (text === '' ? null : Math.round(parseTypedNumber(text) ?? 0)))
  .refine((hours) => hours === null || (hours >= 0 && hours <= 1_000_000), 'These hours cannot be right.');

const ambient = measured(['temperature'], { required: false });

const complaintFields = {
  complaint: longText,
  symptoms: z.array(z.string().max(60)).max(40, 'Choose at most 40 symptoms.').default([]),
  weather: shortText,
  ambient: ambient.value,
  ambientUnit: ambient.unit,
  hours: hoursField,
};

const somethingSaid = (input: { complaint: string; symptoms: string[] }) =>
  input.complaint !== '' || input.symptoms.length > 0;
const SAY_SOMETHING = { path: ['complaint'], message: 'Write what the operator said, or choose a symptom.' };

export const openCaseSchema = z
  .object({
    machine: z
      .string({ error: 'Which machine?' })
      .trim()
      .min(1, 'Which machine? Write its number.')
      .max(60, 'This is too long for a machine number.'),
    circuit: z.string().trim().max(130).default(''),
    severity: z.coerce.number().int().min(1).max(4).optional().catch(undefined),
    ...complaintFields,
  })
  .refine(somethingSaid, SAY_SOMETHING);
export type OpenCaseInput = z.infer<typeof openCaseSchema>;

export const complaintSchema = z
  .object({
    ...complaintFields,
    circuitId: z.coerce.number().int().positive().optional().catch(undefined),
    version: versionField,
  })
  .refine(somethingSaid, SAY_SOMETHING);
export type ComplaintInput = z.infer<typeof complaintSchema>;

export const NOTED_LINKS = ['readings', 'trace', 'repair', 'proof', 'charge'] as const;
export type NotedLink = (typeof NOTED_LINKS)[number];
export const notesSchema = z.object({ note: longText, version: versionField });

const reading = measured(['pressure', 'temperature'], { required: true });
const charge = measured(['mass', 'volume'], { required: false });

/** One schema for each kind of entry; ids are checked against the shop's vocabulary afterwards. */
export const ENTRY_SCHEMAS = {
  reading: z.object({
    kind: z.string({ error: 'Choose what was read.' }).min(1, 'Choose what was read.').max(60),
    value: reading.value,
    unit: reading.unit,
    note: longText,
    photo: z
      .string()
      .trim()
      .regex(/^\d{0,9}$/, 'Choose a photo of this case.')
      .optional(),
  }),
  method: z.object({
    methodId: z.string({ error: 'Choose a method.' }).min(1, 'Choose a method.').max(60),
    outcome: z.enum(METHOD_OUTCOMES, { error: 'Say what it showed.' }),
    note: longText,
  }),
  finding: z.object({
    componentId: z
      .string({ error: 'Choose the part.' })
      .min(1, 'Choose the part, on the drawing or in the list.')
      .max(60),
    failureModeId: choice,
    mechanismId: choice,
    causeId: choice,
    certainty: z.enum(CERTAINTIES, { error: 'Say how sure this is.' }),
    place: longText,
    why: longText,
  }),
  repair: z.object({
    actionId: z.string({ error: 'Choose what was done.' }).min(1, 'Choose what was done.').max(60),
    componentId: choice,
    partNumber: shortText,
    because: z.enum(['failed', 'opened'], { error: 'Say why it was done.' }),
    note: longText,
  }),
  proof: z.object({
    method: z
      .string({ error: 'Say how it was tested.' })
      .trim()
      .min(1, 'Say how it was tested.')
      .max(190, 'Use at most 190 characters.'),
    verdict: z.enum(PROOF_VERDICTS, { error: 'Say what it showed.' }),
    minutes: z
      .string()
      .trim()
      .default('')
      .refine((text) => text === '' || (parseTypedNumber(text) ?? -1) >= 0, 'Write the minutes as a number.')
      .refine((text) => (parseTypedNumber(text) ?? 0) <= 100_000, 'That is too many minutes.'),
    start: measured(['pressure'], { required: false }).value,
    end: measured(['pressure'], { required: false }).value,
    unit: measured(['pressure'], { required: false }).unit,
    note: longText,
  }),
  charge: z
    .object({
      kind: z.enum(CHARGE_KINDS, { error: 'Say what was done.' }),
      substance: shortText,
      value: charge.value,
      unit: charge.unit,
      cylinder: z
        .string()
        .trim()
        .regex(/^\d{0,9}$/, 'Choose a cylinder of the book.')
        .optional(),
      source: shortText,
      note: longText,
    })
    .refine(({ kind, value }) => kind === 'not-needed' || value !== '', {
      path: ['value'],
      message: 'Write the amount.',
    })
    .refine(({ kind, unit }) => kind === 'not-needed' || unit !== '', {
      path: ['unit'],
      message: 'Choose a unit.',
    })
    .refine(({ value }) => (parseTypedNumber(value) ?? 0) >= 0, {
      path: ['value'],
      message: 'An amount cannot be negative.',
    }),
} as const;

export type EntryKind = keyof typeof ENTRY_SCHEMAS;
export type EntryInput<K extends EntryKind> = z.infer<(typeof ENTRY_SCHEMAS)[K]>;

export const ENTRY_LINKS = {
  reading: 'readings',
  method: 'trace',
  finding: 'trace',
  repair: 'repair',
  proof: 'proof',
  charge: 'charge',
} as const satisfies Record<EntryKind, NotedLink>;

export const commentSchema = z.object({
  body: z
    .string({ error: 'Write the comment.' })
    .trim()
    .min(1, 'Write the comment.')
    .max(5000, 'Use at most 5,000 characters.'),
});

export const sameOnMineSchema = z.object({
  machine: z
    .string({ error: 'Which machine?' })
    .trim()
    .min(1, 'Which machine? Write its number.')
    .max(60, 'This is too long for a machine number.'),
  note: longText,
});

const dateField = z
  .string()
  .trim()
  .regex(/^\d{4}-\d{2}-\d{2}$/, 'Write a date.')
  .refine((text) => !Number.isNaN(Date.parse(text)), 'There is no such date.');

export const parkSchema = z.object({
  reason: z
    .string({ error: 'Say what it waits for.' })
    .trim()
    .min(1, 'Say what it waits for.')
    .max(190, 'Use at most 190 characters.'),
  until: dateField,
});

export const closeSchema = z.object({
  reason: z
    .string({ error: 'Say why it is closed.' })
    .trim()
    .min(1, 'Say why it is closed.')
    .max(190, 'Use at most 190 characters.'),
});
