import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { type CatalogueKind, entry, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { fieldErrors } from '#app/features/form-fields.ts';
import { Forbidden } from '#app/features/outcome.ts';
import { type ImportLine, importLineSchema } from './schema.ts';
import { writeImportedCase } from './write-case.server.ts';

export const MOST_LINES = 5000;

export type ImportResult = {
  created: number;
  updated: number;
  failed: { line: number; errors: Record<string, string> }[];
};

/**
 * Takes in cases as JSON lines. Each line stands for itself: good ones are kept when others fail; a case whose id the
 * shop has already is brought up to date.
 */
export async function importCases(actor: Actor, text: string, now: Date): Promise<ImportResult> {
  if (!may(actor.role, 'case:import')) throw new Forbidden();
  const vocabulary = await shopVocabulary(actor.shopId);
  const result: ImportResult = { created: 0, updated: 0, failed: [] };
  const seen = new Map<string, number>();
  const lines = text.replace(/^\ufeff/, '').split('\n');
  for (const [place, raw] of lines.entries()) {
    if (raw.trim() === '') continue;
    const line = place + 1;
    const checked = checkLine(raw, vocabulary);
    if ('errors' in checked) {
      result.failed.push({ line, errors: checked.errors });
      continue;
    }
    const before = seen.get(checked.value.id);
    if (before !== undefined) {
      result.failed.push({ line, errors: { id: `The same id stands on line ${before}.` } });
      continue;
    }
    seen.set(checked.value.id, line);
    const { created } = await writeImportedCase(actor, checked.value, now);
    if (created) result.created += 1;
    else result.updated += 1;
  }
  return result;
}

type Checked = { value: ImportLine } | { errors: Record<string, string> };

/** One line read and checked against the vocabulary. */
function checkLine(raw: string, vocabulary: Vocabulary): Checked {
  let json: unknown;
  try {
    json = JSON.parse(raw);
  } catch {
    return { errors: { '': 'This line is not valid JSON.' } };
  }
  const parsed = importLineSchema.safeParse(json);
  if (!parsed.success) return { errors: fieldErrors(parsed.error) };
  const errors = unknownWords(parsed.data, vocabulary);
  return Object.keys(errors).length > 0 ? { errors } : { value: parsed.data };
}

function unknownWords(value: ImportLine, vocabulary: Vocabulary): Record<string, string> {
  const errors: Record<string, string> = {};
  const check = (field: string, kind: CatalogueKind, id: string) => {
    if (id !== '' && !entry(vocabulary, kind, id))
      errors[field] = `The catalogue has no “${id.slice(0, 60)}”.`;
  };
  check('medium', 'medium', value.medium);
  check('circuit', 'circuit', value.circuit);
  check('component', 'component', value.component);
  check('failureMode', 'failure-mode', value.failureMode);
  check('causeId', 'cause', value.causeId);
  for (const symptom of value.symptoms) check('symptoms', 'symptom', symptom);
  for (const method of value.methods) check('methods', 'method', method);
  return errors;
}
