import { beforeAll, describe, expect, test } from 'vitest';
import {
  addComment,
  assignCase,
  closeUnsolved,
  parkCase,
  removeComment,
  resumeCase,
  returnToWork,
  saveComplaint,
  saveNotes,
  saySameOnMine,
} from '#app/features/cases/commands.server.ts';
import { addEntry, changeEntry, removeEntry } from '#app/features/cases/entries.server.ts';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { openCase } from '#app/features/cases/open-case.server.ts';
import { listHistory, loadCaseHead, loadTalk } from '#app/features/cases/queries.server.ts';
import { complaintSchema, openCaseSchema } from '#app/features/cases/schema.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { Case, Reading } from '#db/models/index.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
let far: MadeShop;

beforeAll(async () => {
  shop = await makeShop();
  far = await makeShop('Far away');
  await makeMachine(shop.shop.id, 'W01');
  await makeMachine(shop.shop.id, 'W02');
});

const chainOf = async (number: number) =>
  Object.fromEntries((await loadCaseHead(shop.tech, number)).chain.map(({ key, state }) => [key, state]));
const stateOf = async (number: number) => (await loadCaseHead(shop.tech, number)).state;
const target = (number: number) => ({ actor: shop.tech, number });
const reading = { kind: 'standing-pressure', value: '28', unit: 'psi', note: '' };
const finding = {
  componentId: 'condenser',
  failureModeId: 'cracked',
  mechanismId: '',
  causeId: 'routing',
  certainty: 'confirmed' as const,
  place: 'bottom row',
  why: '',
};

describe('opening a case', () => {
  test('the machine’s only circuit is taken, the title is the operator’s words', async () => {
    const number = await openTestCase(shop.tech, 'W01', { complaint: 'Blows warm. Fine on the road.' });
    const head = await loadCaseHead(shop.tech, number);
    expect(head).toMatchObject({ title: 'Blows warm.', state: 'open', medium: 'refrigerant' });
    expect(await chainOf(number)).toMatchObject({ complaint: 'partly', readings: 'missing' });
  });

  test.each([
    [{ machine: 'W99', complaint: 'x' }, 'machine'],
    [{ machine: 'W01', complaint: 'x', circuit: 'refrigerant:nowhere' }, 'circuit'],
    [{ machine: 'W01', complaint: 'x', circuit: '999999' }, 'circuit'],
    [{ machine: 'W01', complaint: 'x', symptoms: ['invented'] }, 'symptoms'],
  ])('%j is refused beside its field', async (input, field) => {
    const outcome = await openCase(shop.tech, openCaseSchema.parse(input), new Date());
    expect(outcome).toMatchObject({ ok: false, refused: 'fields' });
    expect(outcome.ok === false && outcome.refused === 'fields' && Object.keys(outcome.fields)).toEqual([
      field,
    ]);
  });

  test('two at once get a number each', async () => {
    const numbers = await Promise.all(Array.from({ length: 6 }, () => openTestCase(shop.tech)));
    expect(new Set(numbers).size).toBe(6);
  });

  test('the office may not, and another shop’s machine does not exist', async () => {
    await expect(openTestCase(shop.office)).rejects.toThrow(Forbidden);
    await expect(openTestCase(far.tech)).rejects.toThrow('No machine');
  });
});

describe('the chain follows the record', () => {
  test('from open to running, and back when a newer test says not tight', async () => {
    const number = await openTestCase(shop.tech);
    expect(await stateOf(number)).toBe('open');
    await addEntry({ actor: shop.tech, number, kind: 'finding', input: finding });
    expect(await stateOf(number)).toBe('leak-found');
    expect((await loadCaseHead(shop.tech, number)).title).toBe('Condenser, cracked (VL-270)');
    const repair = {
      actionId: 'replace-part',
      componentId: 'condenser',
      partNumber: 'C 12/3',
      because: 'failed' as const,
      note: '',
    };
    await addEntry({ actor: shop.tech, number, kind: 'repair', input: repair });
    expect(await stateOf(number)).toBe('repaired');
    expect(await returnToWork(target(number), true, new Date())).toMatchObject({ ok: false });
    const proof = {
      method: 'Vacuum hold',
      verdict: 'tight' as const,
      minutes: '30',
      start: '',
      end: '',
      unit: '',
      note: '',
    };
    await addEntry({ actor: shop.tech, number, kind: 'proof', input: proof });
    expect(await stateOf(number)).toBe('proved-tight');
    expect(await returnToWork(target(number), true, new Date())).toMatchObject({ ok: true });
    expect(await stateOf(number)).toBe('running');
    await addEntry({ actor: shop.tech, number, kind: 'proof', input: { ...proof, verdict: 'not-tight' } });
    expect(await stateOf(number)).toBe('repaired');
  });

  test('the entered value and unit stay as they were typed', async () => {
    const number = await openTestCase(shop.tech);
    await addEntry({ actor: shop.tech, number, kind: 'reading', input: { ...reading, value: '27,5' } });
    const row = await Reading.findOne({ order: [['id', 'DESC']], rejectOnEmpty: true });
    expect(row).toMatchObject({ entered: '27,5', unit: 'psi' });
    expect(row.valueSi).toBeCloseTo(189_605.8, 0);
  });

  test.each([
    ['reading', { ...reading, unit: 'C' }, 'unit'],
    ['reading', { ...reading, kind: 'fluid-temperature' }, 'kind'],
    ['finding', { ...finding, componentId: 'no-such-part' }, 'componentId'],
    ['finding', { ...finding, causeId: 'no-such-cause' }, 'causeId'],
  ] as const)('a %s with a wrong %s is refused', async (kind, input, field) => {
    const number = await openTestCase(shop.tech);
    const outcome = await addEntry({ actor: shop.tech, number, kind, input: input as never });
    expect(outcome).toMatchObject({ ok: false, refused: 'fields', fields: { [field]: expect.any(String) } });
  });

  test('a finding is shown with what its form starts from, and changed in place', async () => {
    const number = await openTestCase(shop.tech);
    const added = await addEntry({ actor: shop.tech, number, kind: 'finding', input: finding });
    const entryId = added.ok ? added.value.id : 0;
    const { view } = await loadLinks(shop.tech, number);
    expect(view.findings).toMatchObject([{ id: entryId, byName: shop.tech.name, values: finding }]);
    const input = { ...finding, certainty: 'ruled-out' as const };
    expect(
      (await changeEntry({ actor: shop.lead, number, kind: 'finding', entryId, version: 2, input })).ok,
    ).toBe(true);
    expect(await stateOf(number)).toBe('open');
  });

  test('a removed entry leaves the chain and stays in the history', async () => {
    const number = await openTestCase(shop.tech);
    const added = await addEntry({ actor: shop.tech, number, kind: 'reading', input: reading });
    const entryId = added.ok ? added.value.id : 0;
    await removeEntry({ actor: shop.tech, number, kind: 'reading', entryId });
    expect(await chainOf(number)).toMatchObject({ readings: 'missing' });
    const { entries } = await listHistory(shop.tech, number, 1);
    expect(entries.map(({ action }) => action)).toEqual(['entry-removed', 'entry-added', 'opened']);
  });
});

describe('two people at once', () => {
  test('at the same complaint: the second is told who came first and what stands now', async () => {
    const number = await openTestCase(shop.tech);
    const words = (complaint: string, version: number) => complaintSchema.parse({ complaint, version });
    expect((await saveComplaint(target(number), words('First.', 1))).ok).toBe(true);
    const second = await saveComplaint({ actor: shop.lead, number }, words('Second.', 1));
    expect(second).toMatchObject({
      ok: false,
      refused: 'conflict',
      byName: shop.tech.name,
      theirs: { complaint: 'First.' },
      version: 2,
    });
    expect((await saveComplaint({ actor: shop.lead, number }, words('Second.', 2))).ok).toBe(true);
  });

  test('at the same notes and the same entry', async () => {
    const number = await openTestCase(shop.tech);
    await saveNotes(target(number), 'trace', 'one', 1);
    expect(await saveNotes({ actor: shop.lead, number }, 'trace', 'two', 1)).toMatchObject({
      refused: 'conflict',
      theirs: { note: 'one' },
    });
    const added = await addEntry({ actor: shop.tech, number, kind: 'reading', input: reading });
    const entryId = added.ok ? added.value.id : 0;
    const change = (value: string) =>
      changeEntry({
        actor: shop.lead,
        number,
        kind: 'reading',
        entryId,
        version: 2,
        input: { ...reading, value },
      });
    expect((await change('30')).ok).toBe(true);
    expect(await change('31')).toMatchObject({ refused: 'conflict', theirs: { entered: '30' } });
  });

  test('adding at once: all are kept', async () => {
    const number = await openTestCase(shop.tech);
    const people = [shop.tech, shop.lead, shop.tech, shop.lead, shop.tech];
    await Promise.all(people.map((actor) => addEntry({ actor, number, kind: 'reading', input: reading })));
    const row = await Case.findOne({ where: { shopId: shop.shop.id, number }, rejectOnEmpty: true });
    expect(await Reading.count({ where: { caseId: row.id } })).toBe(5);
    expect(row.versions.readings).toBe(6);
  });
});

describe('people on a case', () => {
  test('parking needs a reason and a date, and is taken up again', async () => {
    const number = await openTestCase(shop.tech);
    await parkCase(target(number), { reason: 'Hose on order', until: '2027-01-05' });
    expect(await loadCaseHead(shop.tech, number)).toMatchObject({
      state: 'parked',
      parkedReason: 'Hose on order',
    });
    await resumeCase(target(number));
    expect(await stateOf(number)).toBe('open');
  });

  test('only the lead closes a case unsolved and opens it again', async () => {
    const number = await openTestCase(shop.tech);
    await expect(closeUnsolved(target(number), 'gave up')).rejects.toThrow(Forbidden);
    await closeUnsolved({ actor: shop.lead, number }, 'Sold before it was found');
    expect(await stateOf(number)).toBe('closed-unsolved');
    await expect(resumeCase(target(number))).rejects.toThrow(Forbidden);
    await resumeCase({ actor: shop.lead, number });
    expect(await stateOf(number)).toBe('open');
  });

  test('a case is handed to somebody of the shop only', async () => {
    const number = await openTestCase(shop.tech);
    const lead = { actor: shop.lead, number };
    expect(await assignCase(lead, far.tech.userId)).toMatchObject({ ok: false });
    expect((await assignCase(lead, shop.lead.userId)).ok).toBe(true);
    expect((await loadCaseHead(shop.tech, number)).assignee?.name).toBe(shop.lead.name);
  });

  test('comments are taken back by their author or the lead', async () => {
    const number = await openTestCase(shop.tech);
    await addComment({ actor: shop.office, number }, 'Part came.', new Date());
    const [comment] = (await loadTalk(shop.tech, number)).comments;
    await expect(removeComment(target(number), comment?.id ?? 0, new Date())).rejects.toThrow(Forbidden);
    await removeComment({ actor: shop.lead, number }, comment?.id ?? 0, new Date());
    expect((await loadTalk(shop.tech, number)).comments).toEqual([]);
  });

  test('same on mine names the machine it was on, once', async () => {
    const number = await openTestCase(shop.tech, 'W01');
    const say = (machine: string, note: string) =>
      saySameOnMine(target(number), { machine, note }, new Date());
    expect(await say('W01', '')).toMatchObject({ ok: false });
    expect(await say('W77', '')).toMatchObject({ ok: false });
    await say('W02', 'one');
    await say('W02', 'two');
    expect((await loadTalk(shop.tech, number)).sameOnMine).toMatchObject([
      { machineNumber: 'W02', note: 'two' },
    ]);
  });

  test('another shop can do none of it', async () => {
    const number = await openTestCase(shop.tech);
    const theirs = { actor: far.lead, number: number + 500 };
    await expect(addComment(theirs, 'x', new Date())).rejects.toThrow(NotFound);
    await expect(loadCaseHead(far.lead, number)).rejects.toThrow(NotFound);
    await expect(saveNotes({ actor: far.lead, number }, 'trace', 'x')).rejects.toThrow(NotFound);
  });
});
