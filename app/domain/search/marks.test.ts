import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { analyseQuery } from './analyser.ts';
import { markMatches, passage } from './marks.ts';
import { repairWord } from './spelling.ts';

const terms = (query: string) => new Set(analyseQuery(query).map(({ term }) => term));
const marked = (text: string, query: string) =>
  markMatches(text, terms(query))
    .filter((part) => part.marked)
    .map((part) => part.text);

describe('marks', () => {
  test('the word itself, its other forms and what means the same', () => {
    expect(marked('Hoses chafed, no cooling since.', 'chafing hose blows warm')).toEqual([
      'Hoses',
      'chafed',
      'no cooling',
    ]);
  });

  test('nothing is lost or added', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), (text) => {
        expect(
          markMatches(text, terms('gas hose'))
            .map((part) => part.text)
            .join(''),
        ).toBe(text);
      }),
    );
  });

  test('the passage holds the words asked for', () => {
    const text = `${'Nothing to see on this side of the machine. '.repeat(20)}The drier bracket cut the hose. ${'And so on. '.repeat(30)}`;
    const found = passage(text, terms('drier bracket'), 120);
    expect(found).toContain('drier bracket');
    expect(found.length).toBeLessThan(130);
  });
});

describe('spelling', () => {
  const known = ['bracket', 'compressor', 'hose', 'house'].map((word) => ({ word, count: 1 }));
  test.each([
    ['brakcet', 'bracket'],
    ['compresor', 'compressor'],
    ['hoze', 'hose'],
    ['xyzzy', null],
    ['ab', null],
    ['vl270', null],
  ])('%s → %s', (word, repaired) => expect(repairWord(word, known)).toBe(repaired));
});
