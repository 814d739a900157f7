import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { analyse, analyseQuery, fold } from './analyser.ts';

const termsOf = (text: string) => new Set(analyse(text).map(({ term }) => term));
const meet = (query: string, text: string) => {
  const indexed = termsOf(text);
  return analyseQuery(query).some(({ term }) => indexed.has(term));
};

describe('words that must find one another', () => {
  test.each([
    ['gas', 'lost all its refrigerant'],
    ['refrigerant', 'no gas in it'],
    ['charge', 'refrigerant all gone'],
    ['blows warm', 'no cooling at the vents'],
    ['no cooling', 'it blows warm uphill'],
    ['condencer', 'condenser bottom row'],
    ['o ring', 'O-ring flattened'],
    ['oring', 'O-rings'],
    ['R134a', 'R-134a'],
    ['r 134a', 'R-134a'],
    ['134a', 'R-134a'],
    ['ac', 'A/C dead'],
    ['aluminum pipe', 'the aluminium tube'],
    ['VL270', 'Varkholm VL-270'],
    ['vl 270', 'VL-270'],
    ['86-1147', 'part 86/1147 fitted'],
    ['soapy water', 'bubble solution on the joint'],
    ['rubbed through', 'hose chafed through on the bracket'],
  ])('%s finds “%s”', (query, text) => expect(meet(query, text)).toBe(true));

  test('a person’s own word counts more than what it stands for', () => {
    const query = new Map(analyseQuery('sniffer').map(({ term, weight }) => [term, weight]));
    expect(query.get('sniffer')).toBe(1);
    expect(query.get('~sniffer')).toBeLessThan(1);
  });
});

describe('words that must not be merged', () => {
  test.each([
    ['PAG oil', 'mineral oil', '~pag', '~mineral'],
    ['receiver-drier', 'accumulator', '~drier', '~accumulator'],
    ['expansion valve', 'expansion tank', '~txv', '~exp-tank'],
  ])('%s and %s', (one, other, conceptOfOne, conceptOfOther) => {
    expect(termsOf(one)).toContain(conceptOfOne);
    expect(termsOf(other)).toContain(conceptOfOther);
    expect(termsOf(other)).not.toContain(conceptOfOne);
    expect(termsOf(one)).not.toContain(conceptOfOther);
  });

  test('a concept of another medium is left out where the medium is known', () => {
    expect(analyse('water', 'refrigerant').map(({ term }) => term)).not.toContain('~coolant');
    expect(analyse('water', 'coolant').map(({ term }) => term)).toContain('~coolant');
  });
});

describe('any input', () => {
  test('never throws, stays bounded', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 400 }), (text) => {
        for (const { term, weight } of [...analyse(text), ...analyseQuery(text)]) {
          expect(term.length).toBeGreaterThan(0);
          expect(term.length).toBeLessThanOrEqual(60);
          expect(weight).toBeGreaterThan(0);
          expect(weight).toBeLessThanOrEqual(1);
        }
      }),
    );
  });

  test.each(['\ud800', '"+-*()<>~@', '😀😀', 'x'.repeat(5000), '-/.'.repeat(2000), ''])('%j', (text) => {
    expect(() => analyseQuery(text)).not.toThrow();
  });

  test('folding twice changes nothing', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), (text) => {
        expect(fold(fold(text))).toBe(fold(text));
      }),
    );
  });
});
