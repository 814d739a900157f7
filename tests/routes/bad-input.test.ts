import { beforeAll, describe, expect, test } from 'vitest';
import { openTestCase } from '#tests/setup/forms.ts';
import { login, type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';
import { visit } from '#tests/setup/site.ts';

let shop: MadeShop;
const cookies = { lead: '', admin: '' };
const ids = { number: 0, machine: 0, circuit: 0, person: 0 };

beforeAll(async () => {
  shop = await makeShop();
  const { machine, circuit } = await makeMachine(shop.shop.id);
  Object.assign(ids, { machine: machine.id, circuit: circuit.id, person: shop.tech.userId });
  ids.number = await openTestCase(shop.lead);
  cookies.lead = await login(shop.lead);
  cookies.admin = await login(shop.admin);
});

const ADDRESSES: [string, 'lead' | 'admin'][] = [
  ['/sign-in', 'lead'],
  ['/forgot', 'lead'],
  ['/reset/x', 'lead'],
  ['/join/x', 'lead'],
  ['/scheme', 'lead'],
  ['/cases/new', 'lead'],
  ['/cases/:number?index', 'lead'],
  ['/cases/:number/complaint', 'lead'],
  ['/cases/:number/readings', 'lead'],
  ['/cases/:number/trace', 'lead'],
  ['/cases/:number/repair', 'lead'],
  ['/cases/:number/proof', 'lead'],
  ['/cases/:number/charge', 'lead'],
  ['/cases/:number/write-up', 'lead'],
  ['/machines/new', 'lead'],
  ['/machines/import', 'lead'],
  ['/machines/:machine/edit', 'lead'],
  ['/machines/:machine/circuits/new', 'lead'],
  ['/machines/:machine/circuits/:circuit', 'lead'],
  ['/settings', 'lead'],
  ['/refrigerant', 'lead'],
  ['/resources/preview', 'lead'],
  ['/resources/photos/upload', 'lead'],
  ['/resources/photos/1', 'lead'],
  ['/people', 'admin'],
  ['/people/:person', 'admin'],
  ['/settings/catalogue', 'admin'],
  ['/api/v1/cases', 'lead'],
  ['/api/v1/cases/import', 'lead'],
  ['/api/v1/cases/:number/photos', 'lead'],
  ['/api/v1/machines', 'lead'],
  ['/api/v1/cases/:number/entries', 'lead'],
  ['/api/v1/cases/:number/hold-tests', 'lead'],
  ['/api/v1/reference/hold-test', 'lead'],
  ['/api/v1/reference/leak-rate', 'lead'],
];

const LONG = 'ж'.repeat(30_000);
const NASTY = [
  '\u0000',
  '😀'.repeat(200),
  '-1',
  '99999999999999999999',
  'NaN',
  "'; DROP TABLE cases; --",
  '<script>',
  '%00',
];
const FIELDS = [
  'intent',
  'kind',
  'readingKind',
  'value',
  'unit',
  'version',
  'entryId',
  'note',
  'body',
  'title',
  'machine',
  'circuit',
  'complaint',
  'symptoms',
  'number',
  'name',
  'email',
  'role',
  'password',
  'other',
  'assignee',
  'until',
  'reason',
  'photos',
  'words',
  'csv',
  'id',
  'medium',
  'hours',
  'ambient',
  'caption',
  'by',
  'tokenId',
  'plateCharge',
  'year',
];
const INTENTS = [
  'hold-test',
  'cylinder',
  'movement',
  'reverse',
  'add',
  'change',
  'remove',
  'notes',
  'comment',
  'park',
  'assign',
  'judge',
  'same-on-mine',
  'save',
  'publish-now',
  'publish',
  'units',
  'new-token',
  'revoke-token',
  'load',
  'describe',
  'move',
  'close',
  'remove-comment',
  'share',
];

const filled = (address: string) =>
  address.replace(/:(\w+)/g, (_all, name: keyof typeof ids) => String(ids[name]));

describe.each(ADDRESSES)('%s', (address, who) => {
  const send = (options: Parameters<typeof visit>[1]) =>
    visit(filled(address), { as: cookies[who], method: 'POST', ...options });

  test('bodies of the wrong kind are the sender’s fault', async () => {
    const bodies: Parameters<typeof visit>[1][] = [
      { body: '' },
      { body: '{"half', headers: { 'Content-Type': 'application/json' } },
      { body: 'x', headers: { 'Content-Type': 'multipart/form-data' } },
      { body: '--x\r\nnonsense', headers: { 'Content-Type': 'multipart/form-data; boundary=x' } },
      {
        body: new Uint8Array([0xff, 0xfe, 0, 1]),
        headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
      },
      { body: 'a=b', headers: { 'Content-Type': 'text/plain' } },
    ];
    for (const body of bodies) expect((await send(body)).status, JSON.stringify(body)).toBeLessThan(500);
  });

  test('nasty words in every field are no fault of ours', async () => {
    for (const word of [...NASTY, LONG]) {
      const form = Object.fromEntries(FIELDS.map((name) => [name, word]));
      expect((await send({ form })).status, word.slice(0, 30)).toBeLessThan(500);
    }
  });

  test('every intent with nothing else, and with nasty words', async () => {
    for (const intent of INTENTS) {
      expect((await send({ form: { intent } })).status, intent).toBeLessThan(500);
      const form = { ...Object.fromEntries(FIELDS.map((name) => [name, '-1'])), intent };
      expect((await send({ form })).status, `${intent} with -1`).toBeLessThan(500);
    }
  });
});

test.each([
  '/find?q=%00&page=-1&medium=%27&machine=x&year=9999999',
  '/find?page=99999999999999999999',
  '/cases?page=1e9&sort=;drop&yard=-1&machine=0.5',
  '/machines?page=0&sort=&q=%FF%FE',
  '/write-ups?q=%22%22&page=abc&state=x',
  '/cases/0',
  '/cases/999999999',
  '/cases/1.5',
  '/cases/%00',
  '/machines/00000000001',
  '/people/0',
  '/cases/:number/history?page=-5',
  '/cases/:number/trace?part=%3Cscript%3E&edit=finding-99999999999',
  '/reference/glossary?q=%F0%9F%98%80',
  '/reference/pressures?refrigerant=x&temperature=1e99&altitude=-9999999&pressureUnit=__proto__',
  '/reference/pressures?refrigerant=R-744&temperature=90',
  '/reference/hold-test?samples=abc&gauge=x&step=0&litres=-1&ambient=NaN&altitude=%00',
  '/reference/hold-test?samples=0+1%0A0+2%0A0+3%0A0+4%0A0+5&gauge=inHg',
  '/reference/charge?ambient=999&low=x&high=-1&unit=y',
  '/reference/leak-rate?charge=0&added=-1&days=0&year=x',
  '/reference/vacuum?altitude=99999&ambient=-300',
  '/refrigerant?from=x&to=2026-99-99&machine=%00&person=-1&page=0&reverse=x',
  '/refrigerant/export.csv?from=%27&machine=%27',
  '/settings/catalogue?kind=__proto__',
  '/resources/alike?text=%00&symptoms=,,,&medium=%27&machine=%00',
  '/photos/1/medium?until=NaN&sig=x',
  '/photos/0/thumb',
  '/r/%00',
  '/%2e%2e/%2e%2e/etc/passwd',
])('%s is answered', async (address) => {
  for (const as of [cookies.lead, cookies.admin, null])
    expect((await visit(filled(address), { as })).status).toBeLessThan(500);
});
