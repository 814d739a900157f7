import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { issueApiToken, listOwnTokens, revokeApiToken } from '#app/features/api-tokens/tokens.server.ts';
import { importCases } from '#app/features/case-import/import-cases.server.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { alikeCases, alikeComplaint, judgeLikeness } from '#app/features/find/alike.server.ts';
import { Case, Machine, WriteUp } from '#db/models/index.ts';
import { type MadeShop, makeShop } from '#tests/setup/people.ts';

const LINES = readFileSync('db/seeds/demo/cases.jsonl', 'utf8').trim().split('\n').slice(0, 12);

describe('the import', () => {
  let shop: MadeShop;
  beforeAll(async () => {
    shop = await makeShop();
  });

  test('makes machines, circuits and cases, and keeps the technician as a name', async () => {
    const result = await importCases(shop.lead, LINES.join('\n'), new Date());
    expect(result).toEqual({ created: 12, updated: 0, failed: [] });
    const row = await Case.findOne({
      where: { shopId: shop.shop.id, externalId: 'BW-1001' },
      rejectOnEmpty: true,
    });
    expect(row).toMatchObject({ technicianName: 'Rhedyn', openedById: null, imported: true });
    expect(await Machine.count({ where: { shopId: shop.shop.id, number: 'T05' } })).toBe(1);
    const { view } = await loadLinks(shop.tech, row.number);
    expect(view.findings).toMatchObject([{ componentId: 'service-valve-lp', certainty: 'confirmed' }]);
    expect(view.charges).toMatchObject([{ headline: 'Put in: 850 g R-134a' }]);
    expect(await WriteUp.findOne({ where: { caseId: row.id } })).toMatchObject({
      state: 'published',
      title: 'Tyre cores are for tyres',
    });
  });

  test('the same id again updates and doubles nothing', async () => {
    const changed = JSON.stringify({ ...JSON.parse(LINES[0] ?? '{}'), complaint: 'Changed words.' });
    expect(await importCases(shop.lead, changed, new Date())).toEqual({ created: 0, updated: 1, failed: [] });
    const row = await Case.findOne({
      where: { shopId: shop.shop.id, externalId: 'BW-1001' },
      rejectOnEmpty: true,
    });
    expect(row.complaint).toBe('Changed words.');
    const { view } = await loadLinks(shop.tech, row.number);
    expect([view.findings.length, view.methods.length, view.proofs.length, view.charges.length]).toEqual([
      1, 1, 1, 1,
    ]);
  });

  test('good lines are kept when others fail, each failure with its line and field', async () => {
    const good = { ...JSON.parse(LINES[1] ?? '{}'), id: 'X-1' };
    const text = [
      JSON.stringify(good),
      'not json',
      JSON.stringify({ ...good, id: '' }),
      JSON.stringify({ ...good, id: 'X-2', component: 'warp-core' }),
      JSON.stringify({ ...good, id: 'X-3', openedAt: 'yesterday' }),
      JSON.stringify({ ...good, id: 'X-4', symptoms: 'warm' }),
      '',
      '[]',
      JSON.stringify(good),
    ].join('\n');
    const { created, updated, failed } = await importCases(shop.lead, text, new Date());
    expect({ created, updated }).toEqual({ created: 1, updated: 0 });
    expect(failed.map(({ line, errors }) => [line, Object.keys(errors)[0]])).toEqual([
      [2, ''],
      [3, 'id'],
      [4, 'component'],
      [5, 'openedAt'],
      [6, 'symptoms'],
      [8, ''],
      [9, 'id'],
    ]);
  });

  test('an external id belongs to its shop', async () => {
    const other = await makeShop();
    expect(await importCases(other.lead, LINES[0] ?? '', new Date())).toMatchObject({ created: 1 });
  });
});

describe('alike', () => {
  let shop: MadeShop;
  const numberOf = async (externalId: string) =>
    (await Case.findOne({ where: { shopId: shop.shop.id, externalId }, rejectOnEmpty: true })).number;

  beforeAll(async () => {
    shop = await makeShop();
    await importCases(shop.lead, readFileSync('db/seeds/demo/cases.jsonl', 'utf8'), new Date());
  });

  test('the graded likenesses: at least half of the first five are on the list', async () => {
    type Likeness = { case: string; alike: { case: string; grade: number }[] };
    const wanted: Likeness[] = readFileSync('tests/reference/find/likenesses.jsonl', 'utf8')
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line));
    let right = 0;
    for (const { case: id, alike } of wanted) {
      const known = new Set(alike.map((one) => one.case));
      const hits = await alikeCases(shop.tech, await numberOf(id), 5);
      right += hits.filter(({ externalId }) => known.has(externalId ?? '')).length / 5;
    }
    console.info(`alike, precision at 5: ${(right / wanted.length).toFixed(3)} over ${wanted.length}`);
    expect(right / wanted.length).toBeGreaterThan(0.5);
  });

  test('each has its reason, none is the case itself', async () => {
    const number = await numberOf('BW-1091');
    const hits = await alikeCases(shop.tech, number, 10);
    expect(hits.length).toBe(10);
    expect(hits.every((hit) => hit.reasons.length > 0 && hit.number !== number)).toBe(true);
    expect(hits[0]?.reasons.join()).toContain('same part');
  });

  test('a confirmed one comes first, a dismissed one last, for both cases', async () => {
    const [one, other, wrong] = [
      await numberOf('BW-1091'),
      await numberOf('BW-1261'),
      await numberOf('BW-1002'),
    ];
    const judge = (otherNumber: number, verdict: 'confirmed' | 'dismissed' | null) =>
      judgeLikeness({ actor: shop.tech, number: one, otherNumber, verdict }, new Date());
    await judge(other, 'confirmed');
    await judge(wrong, 'dismissed');
    const hits = await alikeCases(shop.tech, one, 100);
    expect(hits[0]).toMatchObject({ number: other, verdict: 'confirmed' });
    expect(hits.at(-1)).toMatchObject({ number: wrong, verdict: 'dismissed' });
    expect((await alikeCases(shop.tech, other, 1))[0]?.number).toBe(one);
    await judge(other, null);
    expect(
      (await alikeCases(shop.tech, one, 100)).find(({ number }) => number === other)?.verdict,
    ).toBeNull();
  });

  test('a complaint that is being typed finds solved cases of its medium', async () => {
    const hits = await alikeComplaint(
      shop.tech,
      { text: 'boom creeps down, ram wet', symptomIds: ['load-drifts'], medium: 'hydraulic-oil' },
      5,
    );
    expect(hits.length).toBeGreaterThan(0);
    expect(new Set(hits.map(({ mediumName }) => mediumName))).toEqual(new Set(['Hydraulic oil']));
    expect(hits.every(({ causeLine }) => causeLine !== '')).toBe(true);
  });

  test('another shop’s case cannot be judged', async () => {
    const far = await makeShop();
    const judgement = {
      actor: far.lead,
      number: await numberOf('BW-1091'),
      otherNumber: await numberOf('BW-1002'),
    };
    await expect(judgeLikeness({ ...judgement, verdict: 'confirmed' }, new Date())).rejects.toThrow();
  });
});

describe('tokens', () => {
  test('are shown once, kept as a hash, and end when revoked', async () => {
    const shop = await makeShop();
    const token = await issueApiToken(shop.tech, 'phone', new Date());
    expect(token).toMatch(/^wm_[\w-]{43}$/);
    const [row] = await listOwnTokens(shop.tech);
    expect(JSON.stringify(row)).not.toContain(token);
    await expect(revokeApiToken(shop.lead, row?.id ?? 0, new Date())).rejects.toThrow();
    await revokeApiToken(shop.tech, row?.id ?? 0, new Date());
    expect(await listOwnTokens(shop.tech)).toEqual([]);
  });
});
