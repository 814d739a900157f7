import { z } from 'zod';
import { isUnit, parseTypedNumber, UNITS } from '#app/domain/units/units.ts';

const text = (most = 190) => z.string().trim().max(most, `Use at most ${most} characters.`).default('');
const NOT_WHOLE = 'Write a whole number.';

function wholeField(least: number, most: number, message: string) {
  return z
    .string()
    .trim()
    .default('')
    .refine((typed) => typed === '' || Number.isInteger(parseTypedNumber(typed)), NOT_WHOLE)
    .transform((typed) => (typed === '' ? null : parseTypedNumber(typed)))
    .refine((value) => value === null || (value >= least && value <= most), message);
}

export const machineSchema = z.object({
  number: z
    .string({ error: 'Write the machine’s own number.' })
    .trim()
    .min(1, 'Write the machine’s own number.')
    .max(60, 'Use at most 60 characters.'),
  kind: text(),
  make: text(),
  model: text(),
  serial: text(),
  year: wholeField(1900, 2100, 'This year cannot be right.'),
  hours: wholeField(0, 1_000_000, 'These hours cannot be right.'),
  yard: text(),
  notes: text(5000),
});
export type MachineInput = z.infer<typeof machineSchema>;

export const circuitSchema = z
  .object({
    circuit: z.string({ error: 'Choose the circuit.' }).regex(/^[\w-]+:[\w-]+$/, 'Choose the circuit.'),
    label: text(),
    refrigerant: text(60),
    plateCharge: z
      .string()
      .trim()
      .max(40, 'This is too long for a number.')
      .default('')
      .refine(
        (typed) => typed === '' || (parseTypedNumber(typed) ?? -1) > 0,
        'Write the plate’s number, like 850 or 1.9.',
      ),
    plateChargeUnit: z.string().default(''),
    oil: text(),
    metering: z.enum(['', 'expansion-valve', 'orifice']).catch(''),
    portsText: text(5000),
  })
  .refine(
    ({ plateCharge, plateChargeUnit }) =>
      plateCharge === '' ||
      (isUnit(plateChargeUnit) && ['mass', 'volume'].includes(UNITS[plateChargeUnit].quantity)),
    { path: ['plateChargeUnit'], message: 'Choose a unit.' },
  );
export type CircuitInput = z.infer<typeof circuitSchema>;

export const MACHINE_SORTS = ['number', 'kind', 'model', 'yard', 'hours', 'cases'] as const;

const id = z.coerce.number().int().positive().max(4_000_000_000).optional().catch(undefined);

export const machineListSchema = z.object({
  q: z.string().max(200).catch(''),
  kind: z.string().max(190).optional().catch(undefined),
  yard: id,
  sort: z
    .string()
    .regex(/^-?(number|kind|model|yard|hours|cases)$/)
    .catch('number'),
  page: z.coerce.number().int().min(1).max(100_000).catch(1),
});
export type MachineListInput = z.infer<typeof machineListSchema>;

export function parseMachineList(params: URLSearchParams): MachineListInput {
  const given = Object.fromEntries([...params].filter(([, value]) => value !== ''));
  return machineListSchema.parse({ q: '', sort: 'number', page: 1, ...given });
}

/** The columns that a fleet file may have, and the other headings under which they are known. */
export const FLEET_COLUMNS = {
  number: ['number', 'machine', 'machine number', 'own number', 'fleet number', 'plant number', 'no'],
  kind: ['kind', 'type', 'machine kind'],
  make: ['make', 'maker', 'manufacturer'],
  model: ['model'],
  serial: ['serial', 'serial number', 'vin', 'pin'],
  year: ['year', 'built'],
  hours: ['hours', 'meter'],
  yard: ['yard', 'depot', 'site'],
  notes: ['notes', 'note', 'remarks'],
} as const satisfies Record<keyof MachineInput, readonly string[]>;
