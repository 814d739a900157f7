import { readFileSync } from 'node:fs';
import { performance } from 'node:perf_hooks';
import { QueryTypes } from 'sequelize';
import { analyseQuery } from '#app/domain/search/analyser.ts';
import { settleCase } from '#app/features/cases/settle.server.ts';
import { alikeCases } from '#app/features/find/alike.server.ts';
import { findCases } from '#app/features/find/queries.server.ts';
import { parseFind } from '#app/features/find/schema.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, User } from '#db/models/index.ts';

/** `npm run bench`: times finding, alike and indexing over the demo, beside the plain full-text index, in one run. */
const queries: string[] = readFileSync('tests/reference/find/queries.jsonl', 'utf8')
  .trim()
  .split('\n')
  .map((line) => JSON.parse(line).query);

const user = await User.findOne({ where: { email: 'tech@brackwater.example' }, rejectOnEmpty: true });
const actor = { userId: user.id, shopId: user.shopId, role: user.role, name: user.name };
const cases = await Case.findAll({ where: { shopId: user.shopId }, order: [['id', 'DESC']], limit: 40 });

async function time<T>(name: string, items: readonly T[], work: (item: T) => unknown): Promise<void> {
  for (const item of items.slice(0, 3)) await work(item);
  const times: number[] = [];
  for (const item of items) {
    const started = performance.now();
    await work(item);
    times.push(performance.now() - started);
  }
  times.sort((x, y) => x - y);
  const at = (share: number) =>
    (times[Math.min(times.length - 1, Math.floor(times.length * share))] ?? 0).toFixed(1).padStart(8);
  process.stdout.write(
    `${name.padEnd(46)} median ${at(0.5)} ms   p95 ${at(0.95)} ms   over ${times.length}\n`,
  );
}

await time('analyse a query', queries, (query) => analyseQuery(query));
await time('find: full text, ranked, with facets and hits', queries, (q) =>
  findCases(actor, parseFind(new URLSearchParams({ q }))),
);
await time('yardstick: plain full text, twenty rows', queries, (q) =>
  sequelize.query(
    `SELECT caseId, MATCH(prepared) AGAINST (:q) AS score FROM search_documents
      WHERE shopId = :shopId AND MATCH(prepared) AGAINST (:q) ORDER BY score DESC LIMIT 20`,
    {
      replacements: { q: q.replace(/[^\p{L}\p{N} ]/gu, ' '), shopId: actor.shopId },
      type: QueryTypes.SELECT,
    },
  ),
);
await time('alike: five cases with their reasons', cases, ({ number }) => alikeCases(actor, number, 5));
await time('settle and index one case', cases, ({ id }) =>
  sequelize.transaction((transaction) => settleCase(id, transaction)),
);
await sequelize.close();
