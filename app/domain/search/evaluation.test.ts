import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { baseVocabulary } from '../vocabulary/vocabulary.ts';
import { analyseQuery } from './analyser.ts';
import { caseFields, prepareDocument } from './document.ts';
import { ndcg } from './ndcg.ts';
import { type Candidate, rank } from './rank.ts';

type DemoCase = Record<string, string> & { symptoms: string[] };
type Query = { query: string; kind: string; style: string; relevant: { case: string; grade: number }[] };

const lines = <T>(file: string): T[] =>
  readFileSync(file, 'utf8')
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line) as T);

const cases = lines<DemoCase>('db/seeds/demo/cases.jsonl');
const queries = lines<Query>('tests/reference/find/queries.jsonl');

const candidates: Candidate[] = cases.map((row, id) => ({
  id,
  ...prepareDocument(
    caseFields(
      {
        medium: row.medium ?? '',
        title: '',
        complaint: row.complaint ?? '',
        symptomIds: row.symptoms,
        findings: [
          {
            componentId: row.component ?? '',
            failureModeId: row.failureMode ?? '',
            causeId: row.causeId ?? '',
            place: row.locationDetail ?? '',
            why: row.cause ?? '',
          },
        ],
        machine: {
          number: row.machineNo ?? '',
          kind: row.machineKind ?? '',
          make: row.make ?? '',
          model: row.model ?? '',
        },
        circuitId: row.circuit ?? '',
        refrigerant: row.refrigerant ?? '',
        partNumbers: [],
        trace: row.traceNotes ?? '',
        repair: row.repair ?? '',
        proof: row.proofNotes ?? '',
        charge: '',
        writeUpTitle: row.noteTitle ?? '',
        writeUp: row.causeAndFix ?? '',
      },
      baseVocabulary,
    ),
    row.medium ?? '',
  ),
}));

const frequency = new Map<string, number>();
for (const { terms } of candidates)
  for (const term of terms.keys()) frequency.set(term, (frequency.get(term) ?? 0) + 1);
const statistics = {
  documentCount: candidates.length,
  meanLength: candidates.reduce((sum, { length }) => sum + length, 0) / candidates.length,
  documentFrequency: (term: string) => frequency.get(term) ?? 0,
};

function evaluate({ query, relevant }: Query): number {
  const grades = new Map(relevant.map((one) => [one.case, one.grade]));
  const shown = rank(analyseQuery(query), candidates, statistics).map(
    ({ id }) => grades.get(cases[id]?.id ?? '') ?? 0,
  );
  return ndcg(shown, [...grades.values()], 10);
}

test('the public queries: nDCG@10 of the ranking alone, in memory', () => {
  const scores = queries.map((query) => ({ ...query, score: evaluate(query) }));
  const mean = (rows: { score: number }[]) => rows.reduce((sum, { score }) => sum + score, 0) / rows.length;
  const names = [...new Set(scores.map(({ kind, style }) => `${kind}, ${style}`))].sort();
  for (const name of names) {
    const rows = scores.filter(({ kind, style }) => name === `${kind}, ${style}`);
    console.info(`${name}: ${mean(rows).toFixed(4)} over ${rows.length}`);
  }
  console.info(`all: ${mean(scores).toFixed(4)} over ${scores.length}`);
  expect(mean(scores)).toBeGreaterThan(0.85);
});
