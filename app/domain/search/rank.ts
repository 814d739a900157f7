import type { Term } from './analyser.ts';

/**
 * Okapi BM25 (Robertson and Walker 1994) over documents whose term frequencies already carry the weights of their fields,
 * then one round of feedback (Rocchio 1971): the best documents lend the query their most telling terms.
 */
export const RANKING = {
  k1: 1.2,
  b: 0.75,
  feedbackDocuments: 5,
  feedbackTerms: 30,
  feedbackWeight: 0.5,
} as const;

export type Candidate = { id: number; length: number; terms: ReadonlyMap<string, number> };

export type Statistics = {
  documentCount: number;
  meanLength: number;
  /** In how many documents a term stands; unknown terms count as rare. */
  documentFrequency: (term: string) => number;
};

export type Ranked = { id: number; score: number; contributions: { term: string; score: number }[] };

/** Inverse document frequency, never negative. */
export function inverseFrequency(documentCount: number, frequency: number): number {
  return Math.log(1 + (documentCount - frequency + 0.5) / (frequency + 0.5));
}

/** The candidates that match, best first; ties go to the higher id. Contributions name the query's own terms only. */
export function rank(
  query: readonly Term[],
  candidates: readonly Candidate[],
  statistics: Statistics,
): Ranked[] {
  const first = score(query, candidates, statistics);
  const feedback = feedbackTerms(first.slice(0, RANKING.feedbackDocuments), candidates, statistics);
  if (feedback.length === 0) return first;
  const again = new Map(score(feedback, candidates, statistics).map(({ id, score: extra }) => [id, extra]));
  return first.map((hit) => ({ ...hit, score: hit.score + (again.get(hit.id) ?? 0) })).sort(byScore);
}

/** BM25 alone, without feedback. */
export function score(
  query: readonly Term[],
  candidates: readonly Candidate[],
  statistics: Statistics,
): Ranked[] {
  const { k1 } = RANKING;
  const weighed = query.map(({ term, weight }) => ({
    term,
    weight: weight * inverseFrequency(statistics.documentCount, statistics.documentFrequency(term)),
  }));
  const ranked: Ranked[] = [];
  for (const { id, length, terms } of candidates) {
    const norm = lengthNorm(length, statistics.meanLength);
    const contributions: Ranked['contributions'] = [];
    let total = 0;
    for (const { term, weight } of weighed) {
      const frequency = terms.get(term);
      if (!frequency) continue;
      const share = (weight * frequency * (k1 + 1)) / (frequency + norm);
      total += share;
      contributions.push({ term, score: share });
    }
    if (total > 0)
      ranked.push({ id, score: total, contributions: contributions.sort((x, y) => y.score - x.score) });
  }
  return ranked.sort(byScore);
}

function feedbackTerms(
  best: readonly Ranked[],
  candidates: readonly Candidate[],
  { documentCount, meanLength, documentFrequency }: Statistics,
): Term[] {
  if (best.length === 0) return [];
  const byId = new Map(candidates.map((candidate) => [candidate.id, candidate]));
  const top = best[0]?.score || 1;
  const gathered = new Map<string, number>();
  for (const { id, score: reached } of best) {
    const document = byId.get(id);
    if (!document) continue;
    const norm = lengthNorm(document.length, meanLength);
    for (const [term, frequency] of document.terms) {
      const share = (frequency * (RANKING.k1 + 1)) / (frequency + norm);
      gathered.set(term, (gathered.get(term) ?? 0) + (share * reached) / top);
    }
  }
  const telling = [...gathered]
    .map(([term, share]) => ({
      term,
      share,
      tells: share * inverseFrequency(documentCount, documentFrequency(term)),
    }))
    .sort((x, y) => y.tells - x.tells)
    .slice(0, RANKING.feedbackTerms);
  const most = telling[0]?.share || 1;
  return telling.map(({ term, share }) => ({ term, weight: (RANKING.feedbackWeight * share) / most }));
}

function lengthNorm(length: number, meanLength: number): number {
  const { k1, b } = RANKING;
  return k1 * (1 - b + (b * length) / Math.max(meanLength, 1));
}

function byScore(x: Ranked, y: Ranked): number {
  return y.score - x.score || y.id - x.id;
}
