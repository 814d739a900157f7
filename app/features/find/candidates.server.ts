import { QueryTypes } from 'sequelize';
import type { Term } from '#app/domain/search/analyser.ts';
import {
  type Candidate,
  RANKING,
  type Ranked,
  rank,
  type Statistics,
  score,
} from '#app/domain/search/rank.ts';
import { sequelize } from '#db/connection.server.ts';
import { fullTextWord } from './index-case.server.ts';
import type { FindInput } from './schema.ts';

/** How many documents the full-text index hands to the ranking. */
const CANDIDATES = 400;
const LONGEST_FULL_TEXT_QUERY = 120;

type Row = { id: number; caseId: number; vector: string; length: number };
export type CaseFilters = Omit<FindInput, 'q' | 'page'> & { onlySolved?: boolean; onlyNoted?: boolean };
export type RankedCase = Ranked & { caseId: number };

/** The WHERE of the filters over `search_documents d`, with its values. */
export function filterClause(
  shopId: number,
  filters: CaseFilters,
): { sql: string; values: Record<string, unknown> } {
  const parts = ["d.shopId = :shopId AND d.kind = 'case'"];
  if (filters.medium) parts.push('d.medium = :medium');
  if (filters.machine) parts.push('d.machineId = :machine');
  if (filters.yard) parts.push('d.yardId = :yard');
  if (filters.state) parts.push('d.state = :state');
  if (filters.component) parts.push('JSON_CONTAINS(d.componentIds, JSON_QUOTE(:component))');
  if (filters.failure) parts.push('JSON_CONTAINS(d.failureModeIds, JSON_QUOTE(:failure))');
  if (filters.method) parts.push('JSON_CONTAINS(d.methodIds, JSON_QUOTE(:method))');
  if (filters.year) parts.push('d.openedAt >= :yearStart AND d.openedAt < :yearEnd');
  if (filters.onlySolved)
    parts.push("d.componentIds <> '[]' AND d.state NOT IN ('open', 'parked', 'closed-unsolved')");
  if (filters.onlyNoted) {
    parts.push("EXISTS (SELECT 1 FROM write_ups w WHERE w.caseId = d.caseId AND w.state = 'published')");
  }
  const values = {
    ...filters,
    shopId,
    yearStart: filters.year ? new Date(Date.UTC(filters.year, 0, 1)) : null,
    yearEnd: filters.year ? new Date(Date.UTC(filters.year + 1, 0, 1)) : null,
  };
  return { sql: parts.join(' AND '), values };
}

/** The cases of a shop that match a query, best first: the full-text index gathers, BM25 with feedback ranks. */
export async function rankCases(
  shopId: number,
  query: readonly Term[],
  filters: CaseFilters,
  exceptCaseId = 0,
): Promise<RankedCase[]> {
  if (query.length === 0) return [];
  const { sql, values } = filterClause(shopId, filters);
  const words = [...query]
    .sort((x, y) => y.weight - x.weight)
    .slice(0, LONGEST_FULL_TEXT_QUERY)
    .map(({ term }) => fullTextWord(term));
  const rows = await sequelize.query<Row>(
    `SELECT d.id, d.caseId, d.vector, d.length, MATCH(d.prepared) AGAINST (:words IN NATURAL LANGUAGE MODE) AS relevance
       FROM search_documents d
      WHERE ${sql} AND MATCH(d.prepared) AGAINST (:words IN NATURAL LANGUAGE MODE) AND d.caseId <> :exceptCaseId
      ORDER BY relevance DESC, d.id DESC LIMIT ${CANDIDATES}`,
    { replacements: { ...values, words: words.join(' '), exceptCaseId }, type: QueryTypes.SELECT },
  );
  const candidates = rows.map(
    ({ id, vector, length }): Candidate => ({ id, length, terms: new Map(JSON.parse(vector)) }),
  );
  const statistics = await loadStatistics(shopId, query, candidates);
  const caseIds = new Map(rows.map(({ id, caseId }) => [id, caseId]));
  return rank(query, candidates, statistics).map((hit) => ({ ...hit, caseId: caseIds.get(hit.id) ?? 0 }));
}

/** The shop's counts for the query's terms and for those of the documents that feedback will take terms from. */
async function loadStatistics(
  shopId: number,
  query: readonly Term[],
  candidates: readonly Candidate[],
): Promise<Statistics> {
  const [totals] = await sequelize.query<{ documentCount: number; meanLength: number | null }>(
    'SELECT COUNT(*) AS documentCount, AVG(length) AS meanLength FROM search_documents WHERE shopId = :shopId',
    { replacements: { shopId }, type: QueryTypes.SELECT },
  );
  const documentCount = Number(totals?.documentCount ?? 0);
  const meanLength = Number(totals?.meanLength ?? 1);
  const asked = await documentFrequencies(
    shopId,
    query.map(({ term }) => term),
  );
  const first = score(query, candidates, {
    documentCount,
    meanLength,
    documentFrequency: (term) => asked.get(term) ?? 0,
  });
  const best = new Set(first.slice(0, RANKING.feedbackDocuments).map(({ id }) => id));
  const lent = new Set<string>();
  for (const { id, terms } of candidates) {
    if (best.has(id)) for (const term of terms.keys()) lent.add(term);
  }
  const all = new Map([...(await documentFrequencies(shopId, [...lent])), ...asked]);
  return { documentCount, meanLength, documentFrequency: (term) => all.get(term) ?? 0 };
}

export async function documentFrequencies(shopId: number, terms: string[]): Promise<Map<string, number>> {
  if (terms.length === 0) return new Map();
  const rows = await sequelize.query<{ term: string; documents: number }>(
    'SELECT term, COUNT(*) AS documents FROM search_terms WHERE shopId = :shopId AND term IN (:terms) GROUP BY term',
    { replacements: { shopId, terms: terms.slice(0, 900) }, type: QueryTypes.SELECT },
  );
  return new Map(rows.map(({ term, documents }) => [term, Number(documents)]));
}
