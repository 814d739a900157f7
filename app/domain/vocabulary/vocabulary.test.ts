import { describe, expect, test } from 'vitest';
import { glossaryEntries } from './glossary.ts';
import {
  type Addition,
  baseVocabulary,
  CATALOGUE_KIND_NAMES,
  CATALOGUE_KINDS,
  CAUTIONS,
  cautionsFor,
  entriesFor,
  entry,
  extendVocabulary,
  mediumName,
  methodFacts,
  nameOf,
  partNames,
  usualProofs,
} from './vocabulary.ts';

const ADDED: Addition = {
  kind: 'component',
  id: 'own-part',
  name: 'Our own bracket joint',
  media: ['refrigerant'],
  otherNames: ['bracket'],
  note: '',
  hidden: false,
};

describe('the base', () => {
  test('has words of every kind, each with a name of its own', () => {
    for (const kind of CATALOGUE_KINDS) {
      const entries = entriesFor(baseVocabulary, kind);
      expect(entries.length).toBeGreaterThan(4);
      expect(CATALOGUE_KIND_NAMES[kind]).not.toBe('');
      for (const { name, id, own, hidden, kind: said } of entries) {
        expect(name).not.toBe('');
        expect(id).toMatch(/^[a-z0-9-]+$/);
        expect([own, hidden, said]).toEqual([false, false, kind]);
      }
    }
  });

  test('a medium has its own parts, circuits, symptoms and methods', () => {
    for (const kind of ['component', 'circuit', 'symptom', 'method'] as const) {
      const mine = entriesFor(baseVocabulary, kind, 'coolant');
      expect(mine.length).toBeGreaterThan(0);
      expect(mine.length).toBeLessThan(entriesFor(baseVocabulary, kind).length);
      for (const { media } of mine) expect(media.length === 0 || media.includes('coolant')).toBe(true);
    }
    expect(entriesFor(baseVocabulary, 'component', 'coolant').map(({ id }) => id)).toContain(
      'none-confirmed',
    );
  });

  test('a symptom is called as operators say it, the other ways are kept', () => {
    expect(entry(baseVocabulary, 'symptom', 'blows-warm')).toMatchObject({
      name: 'Not cold',
      otherNames: ['blows warm', 'blowing hot air', 'no cooling at the vents'],
    });
  });

  test('what it does not know is spelled out', () => {
    expect(nameOf(baseVocabulary, 'component', 'left-hand-thing')).toBe('Left hand thing');
    expect(nameOf(baseVocabulary, 'component', 'condenser')).toBe(
      entry(baseVocabulary, 'component', 'condenser')?.name,
    );
    expect(mediumName(baseVocabulary, 'refrigerant')).toBe('Refrigerant');
  });

  test('part names by id', () => {
    expect(partNames(baseVocabulary, 'refrigerant').condenser).toBe(
      nameOf(baseVocabulary, 'component', 'condenser'),
    );
    expect(partNames(baseVocabulary, 'coolant').condenser).toBeUndefined();
  });

  test('methods say what they find and what not', () => {
    expect(methodFacts('uv-dye')).toMatchObject({
      canFind: expect.any(String),
      cannotFind: expect.any(String),
    });
    expect(methodFacts('prayer')).toBeUndefined();
    expect(usualProofs('coolant').length).toBeGreaterThan(0);
    expect(usualProofs('soup')).toEqual([]);
  });
});

describe('a shop’s additions', () => {
  test('stand beside the base, marked as its own', () => {
    const mine = extendVocabulary(baseVocabulary, [ADDED]);
    expect(entry(mine, 'component', 'own-part')).toEqual({ ...ADDED, own: true });
    expect(entry(baseVocabulary, 'component', 'own-part')).toBeUndefined();
    expect(entriesFor(mine, 'component', 'coolant').map(({ id }) => id)).not.toContain('own-part');
  });

  test('give a base word further names, each once, or hide it', () => {
    const before = entry(baseVocabulary, 'component', 'condenser');
    const again = before?.otherNames[0] ?? '';
    const mine = extendVocabulary(baseVocabulary, [
      { ...ADDED, id: 'condenser', name: 'ignored', otherNames: [again, 'front rad'], hidden: true },
    ]);
    expect(entry(mine, 'component', 'condenser')).toEqual({
      ...before,
      otherNames: [...(before?.otherNames ?? []), 'front rad'],
      hidden: true,
    });
    expect(entriesFor(mine, 'component').map(({ id }) => id)).not.toContain('condenser');
  });
});

describe('cautions', () => {
  const ids = (...args: Parameters<typeof cautionsFor>) => cautionsFor(...args).map(({ id }) => id);
  test.each([
    ['charge', 'refrigerant', ['high-side-can', 'recover', 'frostbite', 'ppe']],
    ['trace', 'hydraulic-oil', ['injection', 'stored-pressure']],
    ['proof', 'coolant', ['hot-coolant']],
    ['repair', 'fuel', ['injection', 'stored-pressure']],
  ] as const)('%s on %s', (step, medium, expected) => {
    expect(ids(step, medium)).toEqual(expect.arrayContaining([...expected, 'local-code']));
  });

  test('those of another medium are left out', () => {
    expect(ids('charge', 'gear-oil').sort()).toEqual(['local-code', 'ppe']);
    expect(ids('trace', 'coolant')).not.toContain('injection');
  });

  test('every one that is asked for exists', () => {
    for (const { id, title, text } of CAUTIONS) expect([id, title, text]).not.toContain('');
  });
});

describe('the glossary', () => {
  test('without a question all, in the order of the alphabet', () => {
    const heads = glossaryEntries('').map(({ head }) => head);
    expect(heads.length).toBeGreaterThan(50);
    expect(heads).toEqual([...heads].sort((x, y) => x.localeCompare(y, 'en')));
  });

  test('finds a word among those that mean the same or nearly', () => {
    const all = glossaryEntries('');
    const near = all.find((one) => one.near.length > 0);
    const same = all.find((one) => one.same.length > 0);
    expect(glossaryEntries(` ${near?.near[0]?.toUpperCase()} `)).toContain(near);
    expect(glossaryEntries(same?.same[0] ?? '')).toContain(same);
    expect(glossaryEntries(same?.head ?? '')).toContain(same);
    expect(glossaryEntries('no such word of the trade')).toEqual([]);
  });

  test('no word is both the same and nearly the same', () => {
    for (const { same, near } of glossaryEntries('')) {
      expect(same.filter((word) => near.includes(word))).toEqual([]);
    }
  });
});
