import { NONE_CONFIRMED } from '../chain/evidence.ts';
import { nameOf, type Vocabulary } from '../vocabulary/vocabulary.ts';
import type { Term } from './analyser.ts';

/** What a case is compared by. */
export type Compared = {
  medium: string;
  machineId: number | null;
  machineModel: string;
  symptomIds: readonly string[];
  componentIds: readonly string[];
  failureModeIds: readonly string[];
};

const NAMED_WORDS = 4;

/** Why two cases are alike, in plain words, the weightiest reason first. */
export function likenessReasons(
  one: Compared,
  other: Compared,
  words: readonly string[],
  vocabulary: Vocabulary,
): string[] {
  const shared = <T>(x: readonly T[], y: readonly T[]) => x.filter((id) => y.includes(id));
  const parts = shared(one.componentIds, other.componentIds).filter((id) => id !== NONE_CONFIRMED);
  const failures = shared(one.failureModeIds, other.failureModeIds);
  const symptoms = shared(one.symptomIds, other.symptomIds);
  const reasons: string[] = [];
  if (parts.length > 0)
    reasons.push(
      `same part: ${parts.map((id) => nameOf(vocabulary, 'component', id).toLowerCase()).join(', ')}`,
    );
  if (failures.length > 0) {
    reasons.push(
      `failed alike: ${failures.map((id) => nameOf(vocabulary, 'failure-mode', id).toLowerCase()).join(', ')}`,
    );
  }
  if (symptoms.length > 0) {
    reasons.push(
      `same symptom: ${symptoms.map((id) => nameOf(vocabulary, 'symptom', id).toLowerCase()).join(', ')}`,
    );
  }
  if (one.machineId !== null && one.machineId === other.machineId) reasons.push('same machine');
  else if (one.machineModel !== '' && one.machineModel === other.machineModel)
    reasons.push(`same model: ${one.machineModel}`);
  if (words.length > 0) reasons.push(`same words: ${words.slice(0, NAMED_WORDS).join(', ')}`);
  return reasons;
}

/** A weighted query out of a document's own terms: its most telling ones, so that a long case asks no endless question. */
export function queryFromDocument(
  terms: ReadonlyMap<string, number>,
  rarity: (term: string) => number,
  limit = 40,
): Term[] {
  return [...terms]
    .map(([term, frequency]) => ({
      term,
      weight: frequency / (frequency + 1.2),
      tells: (frequency / (frequency + 1.2)) * rarity(term),
    }))
    .sort((x, y) => y.tells - x.tells)
    .slice(0, limit)
    .map(({ term, weight }) => ({ term, weight }));
}
