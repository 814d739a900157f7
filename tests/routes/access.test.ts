import { beforeAll, describe, expect, test } from 'vitest';
import { ROLES, type Role } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { saveWriteUp } from '#app/features/write-ups/commands.server.ts';
import { WriteUp } from '#db/models/index.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { login, type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';
import { visit } from '#tests/setup/site.ts';

let shop: MadeShop;
let far: MadeShop;
const cookies = new Map<Role, string>();
const farCookies = new Map<Role, string>();
const ids = { number: 0, machine: 0, circuit: 0, slug: '', person: 0 };

beforeAll(async () => {
  shop = await makeShop();
  far = await makeShop('Far away');
  const { machine, circuit } = await makeMachine(shop.shop.id);
  await makeMachine(far.shop.id, 'F01');
  ids.number = await openTestCase(shop.tech);
  const input = { title: 'A note', body: 'What it did.', photos: [], version: undefined };
  await saveWriteUp({ actor: shop.tech, number: ids.number }, input, new Date());
  const note = await WriteUp.findOne({ where: { shopId: shop.shop.id }, rejectOnEmpty: true });
  Object.assign(ids, { machine: machine.id, circuit: circuit.id, slug: note.slug, person: shop.tech.userId });
  for (const role of ROLES) {
    cookies.set(role, await login(shop[role]));
    farCookies.set(role, await login(far[role]));
  }
});

/** Every page of a shop, what it needs, and whether its address names a row of the shop. */
const PAGES: [string, Action, boolean][] = [
  ['/bench', 'shop:read', false],
  ['/find?q=warm', 'shop:read', false],
  ['/cases', 'shop:read', false],
  ['/cases/new', 'case:open', false],
  ['/cases/:number', 'shop:read', true],
  ['/cases/:number/complaint', 'shop:read', true],
  ['/cases/:number/readings', 'shop:read', true],
  ['/cases/:number/trace', 'shop:read', true],
  ['/cases/:number/repair', 'shop:read', true],
  ['/cases/:number/proof', 'shop:read', true],
  ['/cases/:number/charge', 'shop:read', true],
  ['/cases/:number/write-up', 'shop:read', true],
  ['/cases/:number/history', 'shop:read', true],
  ['/cases/:number/print', 'shop:read', true],
  ['/write-ups', 'shop:read', false],
  ['/write-ups/:slug', 'shop:read', true],
  ['/machines', 'shop:read', false],
  ['/machines/new', 'machine:edit', false],
  ['/machines/import', 'machine:import', false],
  ['/machines/:machine', 'shop:read', true],
  ['/machines/:machine/edit', 'machine:edit', true],
  ['/machines/:machine/circuits/new', 'machine:edit', true],
  ['/machines/:machine/circuits/:circuit', 'machine:edit', true],
  ['/refrigerant', 'shop:read', false],
  ['/refrigerant/record?from=2026-01-01', 'shop:read', false],
  ['/refrigerant/export.csv', 'shop:read', false],
  ['/reference', 'shop:read', false],
  ['/reference/pressures?refrigerant=R-407C&temperature=10', 'shop:read', false],
  ['/reference/hold-test', 'shop:read', false],
  ['/reference/charge?low=18&high=170', 'shop:read', false],
  ['/reference/leak-rate?added=150&days=120', 'shop:read', false],
  ['/reference/vacuum?altitude=1500', 'shop:read', false],
  ['/reference/cautions', 'shop:read', false],
  ['/reference/glossary', 'shop:read', false],
  ['/people', 'people:manage', false],
  ['/people/:person', 'people:manage', true],
  ['/settings', 'shop:read', false],
  ['/settings/catalogue', 'catalogue:manage', false],
];

/** Every way in which a page changes something, with the right that it needs. */
const WRITES: [string, Record<string, string>, Action, boolean][] = [
  ['/cases/new', { machine: 'nothing' }, 'case:open', false],
  ['/cases/:number/complaint', { complaint: '' }, 'case:edit', true],
  [
    '/cases/:number/readings',
    { intent: 'add', kind: 'reading', readingKind: 'standing-pressure', value: '1', unit: 'bar' },
    'case:edit',
    true,
  ],
  [
    '/cases/:number/trace',
    { intent: 'add', kind: 'method', methodId: 'uv-dye', outcome: 'found' },
    'case:edit',
    true,
  ],
  ['/cases/:number/repair', { intent: 'notes', note: 'x' }, 'case:edit', true],
  ['/cases/:number?index', { intent: 'comment', body: 'hello' }, 'case:comment', true],
  ['/cases/:number?index', { intent: 'park', reason: 'a part', until: '2027-01-01' }, 'case:park', true],
  ['/cases/:number?index', { intent: 'resume' }, 'case:park', true],
  ['/cases/:number?index', { intent: 'assign', assignee: '' }, 'case:assign', true],
  ['/cases/:number?index', { intent: 'same-on-mine', machine: 'W99' }, 'case:same-on-mine', true],
  ['/cases/:number?index', { intent: 'share', days: '7' }, 'case:share', true],
  ['/cases/:number/write-up', { intent: 'publish-now', title: 'x', body: 'y' }, 'write-up:review', true],
  ['/cases/:number/write-up', { intent: 'send-back', words: 'no' }, 'write-up:review', true],
  ['/machines/new', { number: '' }, 'machine:edit', false],
  ['/machines/import', { intent: 'preview', csv: '' }, 'machine:import', false],
  ['/machines/:machine/edit', { number: '' }, 'machine:edit', true],
  ['/people', { intent: 'add', name: '' }, 'people:manage', false],
  ['/people/:person', { intent: 'change', name: '' }, 'people:manage', true],
  ['/settings/catalogue', { intent: 'add', kind: 'component', name: '' }, 'catalogue:manage', false],
  ['/refrigerant', { intent: 'cylinder', label: '' }, 'book:write', false],
  ['/resources/preview', { body: 'x' }, 'write-up:write', false],
];

/** Every call of the API: method, address, body, right, whether it names a row. */
const CALLS: [string, string, unknown, Action, boolean][] = [
  ['GET', '/api/v1/find?q=warm', undefined, 'shop:read', false],
  ['GET', '/api/v1/cases', undefined, 'shop:read', false],
  ['POST', '/api/v1/cases', {}, 'case:open', false],
  ['POST', '/api/v1/cases/import', {}, 'case:import', false],
  ['GET', '/api/v1/cases/:number', undefined, 'shop:read', true],
  ['GET', '/api/v1/cases/:number/alike', undefined, 'shop:read', true],
  ['GET', '/api/v1/cases/:number/photos', undefined, 'shop:read', true],
  ['POST', '/api/v1/cases/:number/photos', {}, 'photo:add', true],
  ['POST', '/api/v1/cases/:number/entries', {}, 'case:edit', true],
  ['POST', '/api/v1/cases/:number/hold-tests', {}, 'case:edit', true],
  ['GET', '/api/v1/reference/saturation?refrigerant=R-134a&temperatureC=20', undefined, 'shop:read', false],
  ['GET', '/api/v1/reference/vacuum?altitudeM=0', undefined, 'shop:read', false],
  ['GET', '/api/v1/reference/charge-window?refrigerant=R-134a&ambientC=27', undefined, 'shop:read', false],
  ['POST', '/api/v1/reference/hold-test', {}, 'shop:read', false],
  ['POST', '/api/v1/reference/leak-rate', {}, 'shop:read', false],
  ['GET', '/api/v1/machines', undefined, 'shop:read', false],
  ['POST', '/api/v1/machines', {}, 'machine:edit', false],
  ['GET', '/api/v1/machines/:machine', undefined, 'shop:read', true],
];

const filled = (address: string) =>
  address.replace(/:(\w+)/g, (_all, name: keyof typeof ids) => String(ids[name]));

describe.each(ROLES)('a %s', (role) => {
  test.each(PAGES)('sees %s', async (address, action) => {
    const { status } = await visit(filled(address), { as: cookies.get(role) });
    expect(status).toBe(may(role, action) ? 200 : 403);
  });

  test.each(WRITES)('writes to %s %j', async (address, form, action) => {
    const { status } = await visit(filled(address), { as: cookies.get(role), form });
    if (may(role, action)) expect([200, 302, 400, 409]).toContain(status);
    else expect(status).toBe(403);
  });

  test.each(CALLS)('calls %s %s', async (method, address, json, action) => {
    const { status } = await visit(filled(address), { as: cookies.get(role), method, json });
    if (may(role, action)) expect([200, 201, 400]).toContain(status);
    else expect(status).toBe(403);
  });
});

describe.each(ROLES)('a %s of another shop', (role) => {
  test.each(PAGES.filter(([, , named]) => named))('does not see %s', async (address, action) => {
    const { status } = await visit(filled(address), { as: farCookies.get(role) });
    expect(status).toBe(may(role, action) ? 404 : 403);
  });

  test.each(WRITES.filter(([, , , named]) => named))(
    'does not write to %s %j',
    async (address, form, action) => {
      const { status } = await visit(filled(address), { as: farCookies.get(role), form });
      expect(status === 404 || (status === 403 && !may(role, action))).toBe(true);
    },
  );

  test.each(CALLS.filter(([, , , , named]) => named))(
    'does not reach %s %s',
    async (method, address, json, action) => {
      const { status } = await visit(filled(address), { as: farCookies.get(role), method, json });
      expect(status).toBe(may(role, action) ? 404 : 403);
    },
  );
});

describe('nobody', () => {
  test.each(PAGES)('is led to the sign-in page from %s and back', async (address) => {
    const answer = await visit(filled(address));
    expect(answer.status).toBe(302);
    expect(answer.headers.get('Location')).toBe(`/sign-in?${new URLSearchParams({ to: filled(address) })}`);
  });

  test.each(CALLS)('gets 401 from %s %s', async (method, address, json) => {
    const answer = await visit(filled(address), { method, json });
    expect(answer.status).toBe(401);
    expect(await answer.json()).toMatchObject({ error: { code: 'unauthorized', fields: {} } });
  });

  test.each(['/', '/sign-in', '/forgot', '/api/v1/openapi.json', '/healthz'])(
    'may open %s',
    async (address) => {
      expect((await visit(address)).status).toBe(200);
    },
  );

  test.each([
    '/nothing',
    '/cases/abc',
    '/r/wrong',
    '/reset/wrong',
    '/join/wrong',
    '/api/v1/nothing',
    '/photos/1/huge',
  ])('%s is not there', async (address) => {
    const { status } = await visit(address);
    expect([404, 302]).toContain(status);
  });
});
