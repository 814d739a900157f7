import { readingKind } from '#app/domain/readings/readings.ts';
import { isUnit, parseTypedNumber, toSi, UNITS } from '#app/domain/units/units.ts';
import { type CatalogueKind, entry, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import type { FieldErrors } from '#app/features/outcome.ts';
import type { EntryInput, EntryKind } from './schema.ts';

type Values = Record<string, string | number | null>;
type Checked = { values: Values; fields: FieldErrors };

/** The columns of an entry from its checked form, and what is wrong with it against vocabulary and medium. */
export function entryValues<K extends EntryKind>(
  kind: K,
  input: EntryInput<K>,
  { medium, vocabulary }: { medium: string; vocabulary: Vocabulary },
): Checked {
  const known = (field: string, catalogue: CatalogueKind, id: string): FieldErrors =>
    id === '' || entry(vocabulary, catalogue, id)
      ? {}
      : { [field]: 'This is not in the catalogue. Choose another.' };
  switch (kind) {
    case 'reading':
      return readingValues(input as EntryInput<'reading'>, medium);
    case 'method': {
      const method = input as EntryInput<'method'>;
      return { values: { ...method }, fields: known('methodId', 'method', method.methodId) };
    }
    case 'finding': {
      const finding = input as EntryInput<'finding'>;
      return {
        values: { ...finding },
        fields: {
          ...known('componentId', 'component', finding.componentId),
          ...known('failureModeId', 'failure-mode', finding.failureModeId),
          ...known('mechanismId', 'mechanism', finding.mechanismId),
          ...known('causeId', 'cause', finding.causeId),
        },
      };
    }
    case 'repair': {
      const repair = input as EntryInput<'repair'>;
      return {
        values: { ...repair },
        fields: {
          ...known('actionId', 'repair-action', repair.actionId),
          ...known('componentId', 'component', repair.componentId),
        },
      };
    }
    case 'proof':
      return proofValues(input as EntryInput<'proof'>);
    case 'charge':
      return chargeValues(input as EntryInput<'charge'>);
  }
  throw new Error(`unknown entry kind ${kind satisfies never}`);
}

function readingValues({ kind, value, unit, note, photo }: EntryInput<'reading'>, medium: string): Checked {
  const definition = readingKind(kind);
  const number = parseTypedNumber(value);
  if (!definition || (definition.media.length > 0 && !definition.media.includes(medium))) {
    return { values: {}, fields: { kind: 'This is not read on this medium. Choose another.' } };
  }
  if (number === null || !isUnit(unit))
    return { values: {}, fields: { value: 'Write this as a number, like 12.5.' } };
  if (UNITS[unit].quantity !== definition.quantity) {
    return { values: {}, fields: { unit: `A ${definition.quantity} needs another unit.` } };
  }
  const valueSi = toSi(number, unit);
  const fields: FieldErrors =
    definition.quantity === 'temperature' && valueSi < 0 ? { value: 'It cannot be that cold.' } : {};
  return { values: { kind, entered: value, unit, valueSi, note, photoId: Number(photo) || null }, fields };
}

function proofValues({ method, verdict, minutes, start, end, unit, note }: EntryInput<'proof'>): Checked {
  return {
    values: {
      method,
      verdict,
      minutes: parseTypedNumber(minutes),
      startEntered: start,
      endEntered: end,
      unit,
      note,
    },
    fields: (start || end) && !unit ? { unit: 'Choose the unit of the gauge.' } : {},
  };
}

function chargeValues({
  kind,
  substance,
  value,
  unit,
  cylinder,
  source,
  note,
}: EntryInput<'charge'>): Checked {
  const number = parseTypedNumber(value);
  const amountSi = number !== null && isUnit(unit) ? toSi(number, unit) : 0;
  const cylinderId = Number(cylinder) || null;
  return {
    values: { kind, substance, entered: value, unit, amountSi, cylinderId, source, note },
    fields: {},
  };
}
