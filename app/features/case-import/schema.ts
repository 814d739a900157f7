import { z } from 'zod';

const text = (most: number) =>
  z
    .string()
    .max(most)
    .nullish()
    .transform((value) => value?.trim() ?? '');
const longText = text(50_000);
const shortText = text(190);
const id = z
  .string()
  .max(60)
  .nullish()
  .transform((value) => value?.trim() ?? '');

/** One line of an import: a case as another record keeps it. Only its id, a machine number and a medium are needed. */
export const importLineSchema = z.object({
  id: z.string({ error: 'Give every case an id.' }).trim().min(1, 'Give every case an id.').max(190),
  machineNo: z.string({ error: 'Name the machine.' }).trim().min(1, 'Name the machine.').max(60),
  machineKind: shortText,
  make: shortText,
  model: shortText,
  yard: shortText,
  technician: shortText,
  hours: z
    .number()
    .int()
    .min(0)
    .max(1_000_000)
    .nullish()
    .transform((value) => value ?? null),
  circuit: z.string({ error: 'Name the circuit.' }).trim().min(1, 'Name the circuit.').max(60),
  medium: z.string({ error: 'Name the medium.' }).trim().min(1, 'Name the medium.').max(60),
  refrigerant: text(60),
  openedAt: z
    .string({ error: 'Say when it was opened.' })
    .regex(/^\d{4}-\d{2}-\d{2}(T[\d:.]+Z?)?$/, 'Write the date as 2026-05-31.')
    .refine((value) => !Number.isNaN(Date.parse(value)), 'There is no such date.'),
  ambientC: z
    .number()
    .min(-80)
    .max(80)
    .nullish()
    .transform((value) => value ?? null),
  complaint: longText,
  symptoms: z.array(z.string().max(60)).max(60).default([]),
  traceNotes: longText,
  methods: z.array(z.string().max(60)).max(30).default([]),
  component: id,
  locationDetail: text(2000),
  failureMode: id,
  causeId: id,
  cause: longText,
  repair: longText,
  proofNotes: longText,
  holdMinutes: z
    .number()
    .min(0)
    .max(100_000)
    .nullish()
    .transform((value) => value ?? null),
  chargeGrams: z
    .number()
    .min(0)
    .max(1_000_000)
    .nullish()
    .transform((value) => value ?? null),
  downtimeHours: z
    .number()
    .min(0)
    .max(100_000)
    .nullish()
    .transform((value) => value ?? null),
  noteTitle: shortText,
  causeAndFix: longText,
  repeatOf: shortText,
  severity: z
    .number()
    .int()
    .min(1)
    .max(4)
    .nullish()
    .transform((value) => value ?? null),
});
export type ImportLine = z.infer<typeof importLineSchema>;
