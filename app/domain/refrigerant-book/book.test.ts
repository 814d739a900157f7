import fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  accountsOf,
  balances,
  CYLINDER_KIND_NAMES,
  CYLINDER_KINDS,
  circuitAccount,
  cylinderAccount,
  leakedBeyondPlate,
  MOVEMENT_KIND_NAMES,
  MOVEMENT_KINDS,
  type MovementKind,
  NEEDS_MACHINE,
  PLACE_NAMES,
  PLACES,
  placeOf,
  weighing,
} from './book.ts';

const PLAIN_KINDS = MOVEMENT_KINDS.filter(
  (kind): kind is Exclude<MovementKind, 'weighed'> => kind !== 'weighed',
);

const movement = fc.record({
  kind: fc.constantFrom(...PLAIN_KINDS),
  cylinderId: fc.integer({ min: 1, max: 3 }),
  circuitId: fc.integer({ min: 1, max: 3 }),
  grams: fc.integer({ min: 1, max: 5000 }),
});

test('whatever is entered, nothing is made and nothing vanishes', () => {
  fc.assert(
    fc.property(fc.array(movement), (movements) => {
      const entries = movements.map(({ kind, cylinderId, circuitId, grams }) => {
        const { from, to } = accountsOf(kind, cylinderId, circuitId);
        return { fromAccount: from, toAccount: to, grams };
      });
      expect([...balances(entries).values()].reduce((sum, grams) => sum + grams, 0)).toBe(0);
    }),
  );
});

test('a movement and its reversal leave the accounts as they were', () => {
  const { from, to } = accountsOf('charged', 1, 7);
  const held = balances([
    { fromAccount: 'supplier', toAccount: cylinderAccount(1), grams: 13_608 },
    { fromAccount: from, toAccount: to, grams: 1150 },
    { fromAccount: to, toAccount: from, grams: 1150 },
  ]);
  expect(held.get(cylinderAccount(1))).toBe(13_608);
  expect(held.get(circuitAccount(7))).toBe(0);
});

test('every kind but an opening moves between two different accounts', () => {
  for (const kind of PLAIN_KINDS) {
    const { from, to } = accountsOf(kind, 1, 2);
    expect(from === to).toBe(kind === 'opened');
  }
});

test.each([
  ['bought', 'supplier', 'cylinder'],
  ['charged', 'cylinder', 'circuit'],
  ['recovered', 'circuit', 'cylinder'],
  ['reclaimed', 'cylinder', 'reclaimer'],
  ['returned', 'cylinder', 'supplier'],
  ['lost', 'cylinder', 'lost'],
] as const)('%s: from %s to %s', (kind, from, to) => {
  const accounts = accountsOf(kind, 1, 2);
  expect([placeOf(accounts.from), placeOf(accounts.to)]).toEqual([from, to]);
});

test('after a weighing the book says what the scale said', () => {
  fc.assert(
    fc.property(fc.nat(20_000), fc.nat(20_000), (bookGrams, scaleGrams) => {
      const { from, to, grams } = weighing(1, bookGrams, scaleGrams);
      const held = balances([
        { fromAccount: 'supplier', toAccount: cylinderAccount(1), grams: bookGrams },
        { fromAccount: from, toAccount: to, grams },
      ]);
      expect(grams).toBeGreaterThanOrEqual(0);
      expect(held.get(cylinderAccount(1))).toBe(scaleGrams);
    }),
  );
});

test.each([
  [1150, 0, 1150, 0],
  [2300, 540, 1150, 610],
  [900, 540, 1150, 0],
  [2300, 0, null, null],
])('%d g in, %d g out, plate %s: %s g leaked for certain', (charged, recovered, plate, leaked) => {
  expect(leakedBeyondPlate(charged, recovered, plate)).toBe(leaked);
});

test('only what goes into or comes out of a machine names one', () => {
  expect(MOVEMENT_KINDS.filter((kind) => NEEDS_MACHINE[kind])).toEqual(['charged', 'recovered']);
});

test('everything has a name', () => {
  expect(Object.keys(MOVEMENT_KIND_NAMES).sort()).toEqual([...MOVEMENT_KINDS].sort());
  expect(Object.keys(CYLINDER_KIND_NAMES).sort()).toEqual([...CYLINDER_KINDS].sort());
  expect(Object.keys(PLACE_NAMES).sort()).toEqual([...PLACES].sort());
  expect(PLACES.map((place) => placeOf(`${place}:7`))).toEqual([...PLACES]);
  expect(placeOf('nowhere')).toBe('lost');
});
