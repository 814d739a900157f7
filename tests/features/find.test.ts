import { readFileSync } from 'node:fs';
import { beforeAll, expect, test } from 'vitest';
import { ndcg } from '#app/domain/search/ndcg.ts';
import { importCases } from '#app/features/case-import/import-cases.server.ts';
import { findCases } from '#app/features/find/queries.server.ts';
import { parseFind } from '#app/features/find/schema.ts';
import { type MadeShop, makeShop } from '#tests/setup/people.ts';

type Query = { query: string; kind: string; style: string; relevant: { case: string; grade: number }[] };

const queries: Query[] = readFileSync('tests/reference/find/queries.jsonl', 'utf8')
  .trim()
  .split('\n')
  .map((line) => JSON.parse(line));

let shop: MadeShop;
let other: MadeShop;
const find = (q: string, filters: Record<string, string> = {}) =>
  findCases(shop.tech, parseFind(new URLSearchParams({ q, ...filters })));

beforeAll(async () => {
  shop = await makeShop();
  other = await makeShop('The other shop');
  const result = await importCases(shop.lead, readFileSync('db/seeds/demo/cases.jsonl', 'utf8'), new Date());
  expect(result).toEqual({ created: 150, updated: 0, failed: [] });
});

test('the public queries through the database: nDCG@10 at least 0.85', async () => {
  const scores: (Query & { score: number })[] = [];
  for (const query of queries) {
    const grades = new Map(query.relevant.map((one) => [one.case, one.grade]));
    const { hits } = await findCases(shop.tech, {
      ...parseFind(new URLSearchParams({ q: query.query })),
      limit: 10,
    });
    const shown = hits.map(({ externalId }) => grades.get(externalId ?? '') ?? 0);
    scores.push({ ...query, score: ndcg(shown, [...grades.values()], 10) });
  }
  const mean = (rows: { score: number }[]) => rows.reduce((sum, { score }) => sum + score, 0) / rows.length;
  for (const style of [...new Set(scores.map((row) => row.style))]) {
    const rows = scores.filter((row) => row.style === style);
    console.info(`nDCG@10, ${style}: ${mean(rows).toFixed(4)} over ${rows.length}`);
  }
  console.info(`nDCG@10, all: ${mean(scores).toFixed(4)} over ${scores.length}`);
  expect(mean(scores)).toBeGreaterThan(0.85);
});

test('slang finds cases that do not hold the words', async () => {
  const slang = await find('rubbed through');
  expect(slang.hits[0]?.causeLine.toLowerCase()).toContain('chafed');
});

test('a case number, an external id and a machine number come first', async () => {
  expect((await find('BW-1071')).hits[0]?.externalId).toBe('BW-1071');
  const first = (await find('BW-1071')).hits[0];
  expect((await find(String(first?.number))).hits[0]?.number).toBe(first?.number);
  const machine = await find('W07');
  expect(machine.machine?.number).toBe('W07');
  expect(machine.hits[0]?.machineNumber).toBe('W07');
});

test('a misspelt word is repaired, and the page can say so', async () => {
  const { hits, repaired } = await find('bulkhaed');
  expect(repaired).toEqual([{ from: 'bulkhaed', to: 'bulkhead' }]);
  expect(hits.length).toBeGreaterThan(0);
});

test('facets count what was found, and filters narrow it down', async () => {
  const all = await find('leak');
  const medium = all.facets
    .find(({ name }) => name === 'medium')
    ?.options.find(({ value }) => value === 'hydraulic-oil');
  expect(medium?.count).toBeGreaterThan(0);
  const narrowed = await find('leak', { medium: 'hydraulic-oil' });
  expect(narrowed.total).toBeLessThanOrEqual(all.total);
  expect(new Set(narrowed.hits.map(({ mediumName }) => mediumName))).toEqual(new Set(['Hydraulic oil']));
});

test('pages do not overlap', async () => {
  const [one, two] = [await find('hose'), await find('hose', { page: '2' })];
  const numbers = new Set(one.hits.map(({ number }) => number));
  expect(two.hits.length).toBeGreaterThan(0);
  expect(two.hits.some(({ number }) => numbers.has(number))).toBe(false);
});

test.each([
  '"',
  '+-*()<>~@',
  "' OR 1=1 --",
  '\u0000',
  '😀 warm',
  'x'.repeat(5000),
  '%',
  '\\',
  'NOT AND OR',
  '-warm +cold',
  '*',
  '\ud800',
])('no input breaks it: %j', async (text) => {
  const { hits } = await find(text);
  expect(Array.isArray(hits)).toBe(true);
});

test('another shop finds nothing of it', async () => {
  const found = await findCases(other.lead, parseFind(new URLSearchParams({ q: 'suction hose' })));
  expect(found.hits).toEqual([]);
  const named = await findCases(other.lead, parseFind(new URLSearchParams({ q: 'BW-1071' })));
  expect(named.hits).toEqual([]);
});
