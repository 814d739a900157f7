import { z } from 'zod';
import { openCaseSchema } from '#app/features/cases/schema.ts';
import { machineSchema } from '#app/features/machines/schema.ts';

const numberOrText = z.union([z.string(), z.number().transform(String)]).optional();

/** The body of a new case: the fields of the form, numbers also as numbers. */
export const newCaseBody = z
  .object({
    machine: z.string({ error: 'Name the machine by its number.' }),
    circuit: z.union([z.string(), z.number().transform(String)]).optional(),
    complaint: z.string().optional(),
    symptoms: z.array(z.string()).optional(),
    weather: z.string().optional(),
    ambient: numberOrText,
    ambientUnit: z.string().optional(),
    hours: numberOrText,
    severity: z
      .unknown()
      .optional()
      .meta({ type: 'integer', description: 'From 1, a nuisance, to 4, the machine stands.' }),
  })
  .pipe(openCaseSchema);

export const newMachineBody = z
  .object({
    number: z.string({ error: 'Write the machine’s own number.' }),
    kind: z.string().optional(),
    make: z.string().optional(),
    model: z.string().optional(),
    serial: z.string().optional(),
    year: numberOrText,
    hours: numberOrText,
    yard: z.string().optional(),
    notes: z.string().optional(),
  })
  .pipe(machineSchema);
