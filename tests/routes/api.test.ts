import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { issueApiToken, listOwnTokens, revokeApiToken } from '#app/features/api-tokens/tokens.server.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';
import { visit } from '#tests/setup/site.ts';

let shop: MadeShop;
let token = '';
const LINES = readFileSync('db/seeds/demo/cases.jsonl', 'utf8').trim().split('\n').slice(0, 30).join('\n');

const call = (address: string, options: Parameters<typeof visit>[1] = {}, bearer = token) =>
  visit(`/api/v1${address}`, {
    ...options,
    headers: { Authorization: `Bearer ${bearer}`, ...options.headers },
  });

beforeAll(async () => {
  shop = await makeShop();
  const { circuit } = await makeMachine(shop.shop.id, 'W91');
  await circuit.update({ refrigerant: 'R-134a' });
  token = await issueApiToken(shop.lead, 'tests', new Date());
  const answer = await call('/cases/import', {
    method: 'POST',
    body: LINES,
    headers: { 'Content-Type': 'application/x-ndjson' },
  });
  expect(await answer.json()).toEqual({ created: 30, updated: 0, failed: [] });
});

describe('the API', () => {
  test('finds, with the shape that is described', async () => {
    const answer = await call('/find?q=suction+hose+bracket&limit=3&medium=refrigerant');
    expect(answer.status).toBe(200);
    expect(answer.headers.get('Cache-Control')).toBe('no-store');
    const { results, facets } = await answer.json();
    expect(results.length).toBe(3);
    for (const result of results) {
      expect(result).toMatchObject({
        number: expect.any(Number),
        externalId: expect.stringMatching(/^BW-/),
        title: expect.any(String),
        score: expect.any(Number),
        highlights: expect.any(Array),
        why: expect.any(Array),
      });
    }
    expect(results[0].highlights[0]).toContain('<mark>');
    expect(facets.medium).toEqual([
      { value: 'refrigerant', label: 'Refrigerant', count: expect.any(Number) },
    ]);
  });

  test.each(['limit=0', 'limit=101', 'limit=x', 'limit=1.5'])(
    '%s is a 400 that names the field',
    async (query) => {
      const answer = await call(`/find?q=x&${query}`);
      expect(answer.status).toBe(400);
      expect(await answer.json()).toMatchObject({
        error: { code: 'invalid', fields: { limit: expect.any(String) } },
      });
    },
  );

  test('opens a case and answers it, its likenesses and its photos', async () => {
    const opened = await call('/cases', {
      json: {
        machine: 'W91',
        complaint: 'Hose rubbed through by the step',
        hours: 812,
        ambient: 14,
        ambientUnit: 'C',
      },
    });
    expect(opened.status).toBe(201);
    const { number, state, chain } = await opened.json();
    expect({ state, links: chain.length }).toEqual({ state: 'open', links: 7 });
    const read = await (await call(`/cases/${number}`)).json();
    expect(read.complaint).toMatchObject({
      text: 'Hose rubbed through by the step',
      hours: 812,
      ambient: '14',
    });
    const alike = await (await call(`/cases/${number}/alike?limit=2`)).json();
    expect(alike.results.length).toBe(2);
    expect(alike.results[0].why.length).toBeGreaterThan(0);
    expect(await (await call(`/cases/${number}/photos`)).json()).toEqual({ photos: [] });
  });

  test('keeps the gates: 409 with the rule, until proved or overridden by a lead', async () => {
    const tech = await issueApiToken(shop.tech, 'gates', new Date());
    const opened = await call('/cases', { json: { machine: 'W91', complaint: 'Empty again' } });
    const { number } = await opened.json();
    const charge = (more = {}, bearer = tech) =>
      call(
        `/cases/${number}/entries`,
        { json: { entry: 'charge', fields: { kind: 'charged', value: 500, unit: 'g' }, ...more } },
        bearer,
      );
    const refused = await charge();
    expect(refused.status).toBe(409);
    expect((await refused.json()).error).toMatchObject({
      code: 'gate',
      message: expect.stringContaining('there is no proof'),
    });
    expect((await charge({ override: 'because' })).status).toBe(403);
    expect((await charge({ override: 'Customer signed for it.' }, token)).status).toBe(201);
    const standing = { entry: 'reading', fields: { kind: 'standing-pressure', value: '70', unit: 'psi' } };
    expect((await call(`/cases/${number}/entries`, { json: standing })).status).toBe(201);
    const ambient = { entry: 'reading', fields: { kind: 'ambient-temperature', value: 21, unit: 'C' } };
    expect((await call(`/cases/${number}/entries`, { json: ambient })).status).toBe(201);
    const samples = Array.from({ length: 12 }, (_, minute) => ({
      minutes: minute,
      reading: 300 + (minute % 2),
    }));
    const hold = (more = {}) =>
      call(
        `/cases/${number}/hold-tests`,
        { json: { samples, gauge: 'micron', step: 1, litres: 3, ambient: 21, ...more } },
        tech,
      );
    const evacuation = await hold();
    expect(evacuation.status).toBe(409);
    expect((await evacuation.json()).error.message).toContain('recovered');
    const recovered = { entry: 'charge', fields: { kind: 'recovered', value: 500, unit: 'g' } };
    expect((await call(`/cases/${number}/entries`, { json: recovered }, tech)).status).toBe(201);
    const held = await hold();
    expect(held.status).toBe(201);
    expect((await held.json()).proof).toMatchObject({ verdict: 'tight' });
    expect((await charge()).status).toBe(201);
    expect((await call(`/cases/${number}/entries`, { json: { entry: 'reading', fields: {} } })).status).toBe(
      400,
    );
    expect((await hold({ litres: -1 })).status).toBe(400);
  });

  test('takes photos in, and says which it did not keep', async () => {
    const opened = await call('/cases', { json: { machine: 'W91', complaint: 'Wet fitting' } });
    const { number } = await opened.json();
    const form = new FormData();
    form.append('role', 'uv');
    form.append(
      'photos',
      new File([readFileSync('db/seeds/demo/photos/gauge-static-equal.jpg')], 'gauge.jpg'),
    );
    form.append('photos', new File(['hello'], 'words.jpg'));
    const answer = await call(`/cases/${number}/photos`, { form });
    expect(answer.status).toBe(201);
    expect(await answer.json()).toMatchObject({
      photos: [{ role: 'uv' }],
      errors: [{ file: 'words.jpg', error: 'This is not a JPEG, PNG or WebP picture.' }],
    });
    const bad = new FormData();
    bad.append('photos', new File(['hello'], 'words.jpg'));
    expect((await call(`/cases/${number}/photos`, { form: bad })).status).toBe(400);
    expect((await call(`/cases/${number}/photos`, { json: {} })).status).toBe(400);
  });

  test.each([
    ['no JSON', '{', 'not_json', ''],
    ['no machine', '{"complaint":"x"}', 'invalid', 'machine'],
    ['a strange machine', '{"machine":"W00","complaint":"x"}', 'invalid', 'machine'],
    ['no complaint', '{"machine":"W91"}', 'invalid', 'complaint'],
    ['a list', '[]', 'invalid', ''],
    ['a symptom that is none', '{"machine":"W91","symptoms":["x"]}', 'invalid', 'symptoms'],
  ])('a new case with %s is a 400', async (_what, body, code, field) => {
    const answer = await call('/cases', { method: 'POST', body });
    expect(answer.status).toBe(400);
    const { error } = await answer.json();
    expect(error.code).toBe(code);
    if (field) expect(error.fields).toHaveProperty(field);
  });

  test('bytes that are no text, and too many of them', async () => {
    expect((await call('/cases', { method: 'POST', body: new Uint8Array([0xff, 0xfe, 0xc3]) })).status).toBe(
      400,
    );
    expect((await call('/cases', { method: 'POST', body: 'x'.repeat(1_100_000) })).status).toBe(413);
  });

  test('machines are listed, added once, and read', async () => {
    const added = await call('/machines', { json: { number: 'G77', kind: 'grader', hours: 12 } });
    expect(added.status).toBe(201);
    const { id } = await added.json();
    expect((await call('/machines', { json: { number: 'G77' } })).status).toBe(400);
    expect(await (await call(`/machines/${id}`)).json()).toMatchObject({ number: 'G77', circuits: [] });
    const list = await (await call('/machines?q=G77')).json();
    expect(list).toMatchObject({ total: 1, machines: [{ number: 'G77' }] });
  });

  test.each([
    ['DELETE', '/cases'],
    ['PUT', '/cases/1'],
    ['GET', '/cases/import'],
    ['POST', '/find'],
  ])('%s %s is a 405 that says what is allowed', async (method, address) => {
    const answer = await call(address, { method });
    expect(answer.status).toBe(405);
    expect(answer.headers.get('Allow')).toBeTruthy();
    expect(await answer.json()).toMatchObject({ error: { code: 'method_not_allowed' } });
  });

  test.each(['/cases/999999', '/cases/abc', '/cases/1e3', '/machines/0', '/nothing/here'])(
    '%s is a 404',
    async (address) => {
      const answer = await call(address);
      expect(answer.status).toBe(404);
      expect(await answer.json()).toMatchObject({ error: { code: 'not_found', fields: {} } });
    },
  );

  test('a token that is wrong, of another kind or revoked is a 401', async () => {
    for (const bearer of ['', 'x', 'wm_aaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaaa']) {
      expect((await call('/cases', {}, bearer)).status).toBe(401);
    }
    expect((await visit('/api/v1/cases', { headers: { Authorization: 'Basic eDp5' } })).status).toBe(401);
    const spent = await issueApiToken(shop.tech, 'spent', new Date());
    expect((await call('/cases', {}, spent)).status).toBe(200);
    const [row] = await listOwnTokens(shop.tech);
    await revokeApiToken(shop.tech, row?.id ?? 0, new Date());
    expect((await call('/cases', {}, spent)).status).toBe(401);
  });

  test('describes itself, every address and every refusal', async () => {
    const document = await (await visit('/api/v1/openapi.json')).json();
    expect(document.openapi).toBe('3.1.0');
    expect(Object.keys(document.paths).sort()).toEqual([
      '/api/v1/cases',
      '/api/v1/cases/import',
      '/api/v1/cases/{number}',
      '/api/v1/cases/{number}/alike',
      '/api/v1/cases/{number}/entries',
      '/api/v1/cases/{number}/hold-tests',
      '/api/v1/cases/{number}/photos',
      '/api/v1/find',
      '/api/v1/machines',
      '/api/v1/machines/{id}',
      '/api/v1/reference/charge-window',
      '/api/v1/reference/hold-test',
      '/api/v1/reference/leak-rate',
      '/api/v1/reference/saturation',
      '/api/v1/reference/vacuum',
    ]);
    expect(document.components.schemas).toHaveProperty('Error');
  });
});
