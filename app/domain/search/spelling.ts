import { distance } from 'fastest-levenshtein';

/**
 * The known word nearest to a misspelt one: one edit for four to six letters, two from seven on, the commonest of the
 * nearest; null when nothing is near. Short words and words with digits are left alone.
 */
export function repairWord(word: string, known: Iterable<{ word: string; count: number }>): string | null {
  if (word.length < 4 || /\d/.test(word)) return null;
  const allowed = word.length < 7 ? 1 : 2;
  let best: { word: string; edits: number; count: number } | null = null;
  for (const candidate of known) {
    if (Math.abs(candidate.word.length - word.length) > allowed) continue;
    const edits = distance(word, candidate.word);
    if (edits > allowed) continue;
    if (!best || edits < best.edits || (edits === best.edits && candidate.count > best.count)) {
      best = { word: candidate.word, edits, count: candidate.count };
    }
  }
  return best?.word ?? null;
}
