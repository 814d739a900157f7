import fc from 'fast-check';
import { expect, test } from 'vitest';
import { slugOf } from './slug.ts';

test.each([
  ['Do the brackets in winter', 'do-the-brackets-in-winter'],
  ['  Größe & Öl! ', 'große-ol'.replace('ß', '-')],
  ['O-ring: R-134a', 'o-ring-r-134a'],
  ['!!!', ''],
])('%j is %j', (text, slug) => expect(slugOf(text, 80)).toBe(slug));

test('any text becomes a word that an address holds', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'grapheme' }), fc.integer({ min: 1, max: 40 }), (text, longest) => {
      expect(slugOf(text, longest)).toMatch(/^([a-z0-9]+(-[a-z0-9]+)*)?$/);
      expect(slugOf(text, longest).length).toBeLessThanOrEqual(longest);
    }),
  );
});
