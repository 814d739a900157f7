import { beforeEach, describe, expect, test } from 'vitest';
import { addEntry } from '#app/features/cases/entries.server.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import { Forbidden } from '#app/features/outcome.ts';
import {
  answerFlag,
  flagWriteUp,
  publishWriteUp,
  saveWriteUp,
  sendBackWriteUp,
  submitWriteUp,
  withdrawWriteUp,
} from '#app/features/write-ups/commands.server.ts';
import { renderNote } from '#app/features/write-ups/markdown.server.ts';
import { listWriteUps, loadNoteDesk, loadWriteUp } from '#app/features/write-ups/queries.server.ts';
import { GateOverride } from '#db/models/index.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
let number: number;
const now = () => new Date();
const text = (body: string, version?: number) => ({
  title: 'Hose on the bracket',
  body,
  photos: [],
  version,
});
const tech = () => ({ actor: shop.tech, number });
const lead = () => ({ actor: shop.lead, number });
const publish = (override = '', input: ReturnType<typeof text> | null = null) =>
  publishWriteUp(lead(), { input, override }, now());

beforeEach(async () => {
  shop = await makeShop();
  await makeMachine(shop.shop.id);
  number = await openTestCase(shop.tech);
});

async function solve() {
  const finding = {
    componentId: 'suction-hose',
    failureModeId: 'chafed-through',
    mechanismId: '',
    causeId: 'routing',
    place: '',
    why: '',
  };
  await addEntry({ ...tech(), kind: 'method', input: { methodId: 'uv-dye', outcome: 'found', note: '' } });
  await addEntry({ ...tech(), kind: 'finding', input: { ...finding, certainty: 'confirmed' } });
  const repair = {
    actionId: 'make-up-hose',
    componentId: 'suction-hose',
    partNumber: '',
    because: 'failed' as const,
    note: '',
  };
  await addEntry({ ...tech(), kind: 'repair', input: repair });
  const proof = {
    method: 'Hold',
    verdict: 'tight' as const,
    minutes: '30',
    start: '',
    end: '',
    unit: '',
    note: '',
  };
  await addEntry({ ...tech(), kind: 'proof', input: proof });
}

describe('the way of a note', () => {
  test('draft, review, sent back with remarks, review, published', async () => {
    await solve();
    expect((await saveWriteUp(tech(), text('First.'), now())).ok).toBe(true);
    expect((await submitWriteUp(tech(), now())).ok).toBe(true);
    await expect(saveWriteUp(tech(), text('Too late.'), now())).rejects.toThrow(Forbidden);
    expect((await sendBackWriteUp(lead(), 'Say where.', now())).ok).toBe(true);
    expect((await loadNoteDesk(shop.tech, number)).remarks).toMatchObject([{ body: 'Say where.' }]);
    expect((await saveWriteUp(tech(), text('Behind the step.'), now())).ok).toBe(true);
    expect((await submitWriteUp(tech(), now())).ok).toBe(true);
    await expect(publishWriteUp(tech(), { input: null, override: '' }, now())).rejects.toThrow(Forbidden);
    expect((await publish()).ok).toBe(true);
    expect((await loadCaseHead(shop.tech, number)).state).toBe('written-up');
  });

  test('publishing is refused naming what is missing, until it is there', async () => {
    await saveWriteUp(lead(), text('Too early.'), now());
    const refused = await publish();
    expect(refused).toMatchObject({
      ok: false,
      refused: 'gate',
      lacks: ['no finding is confirmed', 'no repair is on record'],
    });
    await solve();
    expect((await publish()).ok).toBe(true);
  });

  test('the lead overrides with a written reason, which stays on the record; a tech cannot', async () => {
    await saveWriteUp(lead(), text('All the same.'), now());
    expect((await publish('The customer took the machine away.')).ok).toBe(true);
    const overrides = await GateOverride.findAll({ where: { shopId: shop.shop.id } });
    expect(overrides).toMatchObject([
      { gate: 'publish-write-up', reason: 'The customer took the machine away.', byName: shop.lead.name },
    ]);
    expect(overrides[0]?.lacks).toContain('no repair is on record');
  });

  test('a published note keeps its revisions and shows what changed', async () => {
    await solve();
    await saveWriteUp(lead(), text('The hose rubbed on the bracket.'), now());
    await publish();
    expect(await saveWriteUp(lead(), text('Quietly changed.'), now())).toMatchObject({
      ok: false,
      refused: 'fields',
    });
    await publish('', text('The hose rubbed on the tank bracket.'));
    const slug = (await loadCaseHead(shop.tech, number)).note?.slug ?? '';
    const { revisions } = await loadWriteUp(shop.tech, slug);
    expect(revisions.map((revision) => revision.number)).toEqual([2, 1]);
    expect(
      revisions[0]?.changes?.filter(({ kind }) => kind === 'added').map(({ text: added }) => added.trim()),
    ).toEqual(['tank']);
  });

  test('withdrawn, the case is no longer written up and the note is no longer found', async () => {
    await solve();
    await saveWriteUp(lead(), text('Wrong after all: peculiarword.'), now());
    await publish();
    expect((await listWriteUps(shop.tech, { q: 'peculiarword', page: 1 })).total).toBe(1);
    await withdrawWriteUp(lead(), 'It was the clamp.', now());
    expect((await loadCaseHead(shop.tech, number)).state).toBe('proved-tight');
    expect((await listWriteUps(shop.tech, { q: 'peculiarword', page: 1 })).total).toBe(0);
  });

  test('two editors: the second is told and sees the first one’s text', async () => {
    await saveWriteUp(tech(), text('One.'), now());
    await saveWriteUp(lead(), text('Two.', 1), now());
    expect(await saveWriteUp(tech(), text('Three.', 1), now())).toMatchObject({
      refused: 'conflict',
      theirs: { body: 'Two.' },
      version: 2,
    });
  });

  test('anyone flags an error in a published note and gets an answer from the lead', async () => {
    await solve();
    await saveWriteUp(lead(), text('Torque snug.'), now());
    const office = { actor: shop.office, number };
    expect(await flagWriteUp(office, 'Which torque?', now())).toMatchObject({ ok: false });
    await publish();
    expect((await flagWriteUp(office, 'Which torque?', now())).ok).toBe(true);
    const slug = (await loadCaseHead(shop.tech, number)).note?.slug ?? '';
    const [flag] = (await loadWriteUp(shop.tech, slug)).flags;
    await expect(answerFlag(tech(), flag?.id ?? 0, 'Dunno', now())).rejects.toThrow(Forbidden);
    await answerFlag(lead(), flag?.id ?? 0, 'As the manual says.', now());
    expect((await loadWriteUp(shop.office, slug)).flags).toMatchObject([
      { answer: 'As the manual says.', answeredByName: shop.lead.name },
    ]);
  });
});

describe('Markdown', () => {
  test.each([
    ['<script>alert(1)</script>hello', 'script'],
    ['<img src=x onerror=alert(1)>', 'onerror'],
    ['[x](javascript:alert(1))', 'javascript:'],
    ['<a href="data:text/html,x">x</a>', 'data:'],
    ['<iframe src="//evil.example"></iframe>', 'iframe'],
    ['<p style="position:fixed">x</p>', 'style'],
    ['<form action="/x"><input></form>', 'form'],
  ])('%s is made harmless', (markdown, harm) => expect(renderNote(markdown)).not.toContain(harm));

  test('what a note needs is kept', () => {
    const html = renderNote(
      '# Why\n\n- **one**\n- two\n\n| a | b |\n|---|---|\n| 1 | 2 |\n\n[manual](https://maker.example/m)',
    );
    for (const part of ['<h3>Why</h3>', '<strong>one</strong>', '<table>', 'href="https://maker.example/m"'])
      expect(html).toContain(part);
  });
});
