import { beforeEach, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { addEntry, changeEntry, removeEntry } from '#app/features/cases/entries.server.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import type { EntryInput } from '#app/features/cases/schema.ts';
import { addCertificate } from '#app/features/people/certificates.server.ts';
import { addCylinder, addMovement, reverseMovement } from '#app/features/refrigerant-book/commands.server.ts';
import { listMovements, loadStock } from '#app/features/refrigerant-book/queries.server.ts';
import { movementSchema, parseBook } from '#app/features/refrigerant-book/schema.ts';
import { AuditEntry, Charge, GateOverride, Movement, Photo } from '#db/models/index.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
let number: number;
let full: number;
let recovery: number;
const now = new Date();
const ALL = parseBook(new URLSearchParams());

beforeEach(async () => {
  shop = await makeShop();
  const { circuit } = await makeMachine(shop.shop.id);
  await circuit.update({
    refrigerant: 'R-134a',
    plateChargeGrams: 1150,
    plateCharge: '1150',
    plateChargeUnit: 'g',
  });
  number = await openTestCase(shop.tech);
  const cylinder = async (label: string, refrigerant = 'R-134a') => {
    const made = await addCylinder(shop.office, { label, refrigerant, kind: 'new' }, now);
    return made.ok ? made.value.id : 0;
  };
  full = await cylinder('C5');
  recovery = await cylinder('Recovery 2');
  await addMovement(
    shop.office,
    movementSchema.parse({ kind: 'bought', cylinder: full, amount: '2000', unit: 'g' }),
    now,
  );
  await addEntry({
    actor: shop.tech,
    number,
    kind: 'proof',
    input: { method: 'Hold', verdict: 'tight', minutes: '30', start: '', end: '', unit: '', note: '' },
  });
});

const input = (
  kind: 'charged' | 'recovered',
  value: string,
  cylinder: number | '',
  unit = 'g',
): EntryInput<'charge'> => ({
  ...{ kind, value, unit, cylinder: String(cylinder) },
  substance: '',
  source: '',
  note: '',
});
const charge = (...[kind, value, cylinder, unit]: Parameters<typeof input>) =>
  addEntry({ actor: shop.tech, number, kind: 'charge', input: input(kind, value, cylinder, unit) });
const held = async (id: number, actor: Actor = shop.tech) =>
  (await loadStock(actor)).cylinders.find((cylinder) => cylinder.id === id)?.grams;
const mine = () => ({ where: { shopId: shop.shop.id } });
const entryOf = (outcome: Awaited<ReturnType<typeof charge>>) => (outcome.ok ? outcome.value.id : 0);

describe('a charge entry with a cylinder of the book', () => {
  test('enters the book by itself, tied to cylinder, circuit, case, person and certificate', async () => {
    await addCertificate(shop.admin, shop.tech.userId, { name: 'Category I, 4711', expiresOn: '' });
    expect((await charge('recovered', '400', recovery)).ok).toBe(true);
    expect((await charge('charged', '1150', full)).ok).toBe(true);
    expect([await held(full), await held(recovery)]).toEqual([850, 400]);
    const { movements } = await listMovements(shop.tech, ALL);
    expect(movements[0]).toMatchObject({
      kind: 'charged',
      grams: 1150,
      cylinderLabel: 'C5',
      machineNumber: 'W01',
      caseNumber: number,
      certificate: 'Category I, 4711',
      byName: shop.tech.name,
    });
    expect(movements[0]?.circuitName).toBeDefined();
    const { view } = await loadLinks(shop.tech, number);
    expect(view.charges.map(({ lines }) => lines)).toEqual([
      ['Into Recovery 2, in the book'],
      ['From C5, in the book'],
    ]);
  });

  test('cannot overdraw the cylinder, and nothing of it stays, not even an override', async () => {
    await charge('charged', '1100', full);
    const refused = await addEntry({
      actor: shop.lead,
      number,
      kind: 'charge',
      input: input('charged', '1100', full),
      override: 'The plate is wrong.',
    });
    expect(refused).toMatchObject({ ok: false, fields: { value: 'C5 holds 900 g only.' } });
    expect(await GateOverride.count(mine())).toBe(0);
    expect(await Charge.count(mine())).toBe(1);
    expect(await held(full)).toBe(900);
  });

  test('ten cases drawing at once cannot overdraw it', async () => {
    const numbers: number[] = [];
    for (let place = 0; place < 10; place += 1) {
      await makeMachine(shop.shop.id, `M${place}`);
      const made = await openTestCase(shop.tech, `M${place}`);
      await addEntry({
        actor: shop.tech,
        number: made,
        kind: 'proof',
        input: { method: 'Hold', verdict: 'tight', minutes: '', start: '', end: '', unit: '', note: '' },
      });
      numbers.push(made);
    }
    const outcomes = await Promise.all(
      numbers.map((made) =>
        addEntry({ actor: shop.tech, number: made, kind: 'charge', input: input('charged', '300', full) }),
      ),
    );
    expect(outcomes.filter(({ ok }) => ok)).toHaveLength(6);
    expect(await held(full)).toBe(200);
    expect(await Charge.count(mine())).toBe(6);
    expect(await loadStock(shop.tech)).toMatchObject({ outOfBalanceGrams: 0, overdrawn: [] });
  });

  test('changed: the first movement is reversed and the right one entered', async () => {
    const entryId = entryOf(await charge('charged', '510', full));
    const changed = await changeEntry({
      actor: shop.tech,
      number,
      kind: 'charge',
      entryId,
      version: undefined,
      input: input('charged', '1150', full),
    });
    expect(changed.ok).toBe(true);
    expect(await held(full)).toBe(850);
    const { movements } = await listMovements(shop.tech, ALL);
    expect(movements.map(({ grams, reversed, reverses }) => [grams, reversed, reverses !== null])).toEqual([
      [1150, false, false],
      [510, false, true],
      [510, true, false],
      [2000, false, false],
    ]);
  });

  test('removed: its movement is reversed and stays in the book', async () => {
    const entryId = entryOf(await charge('charged', '510', full));
    expect((await removeEntry({ actor: shop.tech, number, kind: 'charge', entryId })).ok).toBe(true);
    expect(await held(full)).toBe(2000);
    expect(await Movement.count(mine())).toBe(3);
    expect(await AuditEntry.count({ where: { shopId: shop.shop.id, action: 'movement-reversed' } })).toBe(1);
  });

  test('what was recovered and used since cannot be taken back out of its cylinder', async () => {
    const entryId = entryOf(await charge('recovered', '400', recovery));
    await addMovement(
      shop.office,
      movementSchema.parse({ kind: 'reclaimed', cylinder: recovery, amount: '300', unit: 'g' }),
      now,
    );
    expect(await removeEntry({ actor: shop.tech, number, kind: 'charge', entryId })).toMatchObject({
      ok: false,
      fields: { '': expect.stringContaining('no longer holds') },
    });
    expect(await Charge.count(mine())).toBe(1);
  });

  test('its movement is not reversed by hand, but by the entry', async () => {
    await charge('charged', '510', full);
    const movement = await Movement.findOne({
      where: { shopId: shop.shop.id, kind: 'charged' },
      rejectOnEmpty: true,
    });
    expect(await reverseMovement(shop.lead, movement.id, 'typo', now)).toMatchObject({
      ok: false,
      fields: { '': expect.stringContaining(`case ${number}`) },
    });
  });

  test.each([
    ['another refrigerant', async () => (await other('R-1234yf')) ?? 0, 'g', 'cylinder'],
    ['no such cylinder', async () => 999_999, 'g', 'cylinder'],
    ['a volume', async () => full, 'ml', 'value'],
  ])('%s is refused beside its field', async (_what, cylinder, unit, field) => {
    expect(await charge('charged', '100', await cylinder(), unit)).toMatchObject({
      ok: false,
      fields: { [field]: expect.any(String) },
    });
  });

  test('another shop’s cylinder does not exist', async () => {
    const far = await makeShop();
    const made = await addCylinder(far.lead, { label: 'F1', refrigerant: 'R-134a', kind: 'new' }, now);
    expect(await charge('recovered', '100', made.ok ? made.value.id : 0)).toMatchObject({
      fields: { cylinder: 'Choose a cylinder of this shop.' },
    });
  });

  test('an entry without a cylinder is named as not in the book', async () => {
    await charge('charged', '100', '');
    expect((await loadStock(shop.tech)).outsideBook).toEqual({ count: 1, cases: [number] });
  });
});

async function other(refrigerant: string): Promise<number | null> {
  const made = await addCylinder(shop.office, { label: refrigerant, refrigerant, kind: 'new' }, now);
  return made.ok ? made.value.id : null;
}

describe('a reading with the photo of its gauge', () => {
  const photo = async (caseNumber: number) => {
    const { row } = await loadLinks(shop.tech, caseNumber);
    return Photo.create({
      shopId: shop.shop.id,
      caseId: row.id,
      link: 'readings',
      role: 'gauge',
      objectKey: `gauge-${caseNumber}-${shop.shop.id}`,
      bytes: 1,
      width: 4,
      height: 3,
      sha256: 'a'.repeat(64),
      capturedAtSource: 'unknown',
      uploadedAt: now,
    });
  };
  const reading = (photoId: number) =>
    addEntry({
      actor: shop.tech,
      number,
      kind: 'reading',
      input: { kind: 'low-side-pressure', value: '2', unit: 'bar', note: '', photo: String(photoId) },
    });

  test('shows it', async () => {
    const gauge = await photo(number);
    expect((await reading(gauge.id)).ok).toBe(true);
    expect((await loadLinks(shop.tech, number)).view.readings[0]?.photoId).toBe(gauge.id);
  });

  test('only one of its own case', async () => {
    await makeMachine(shop.shop.id, 'W02');
    const elsewhere = await photo(await openTestCase(shop.tech, 'W02'));
    expect(await reading(elsewhere.id)).toMatchObject({ fields: { photo: 'Choose a photo of this case.' } });
    expect(await reading(999_999)).toMatchObject({ fields: { photo: expect.any(String) } });
  });
});
