import fc from 'fast-check';
import { expect, test } from 'vitest';
import { accountsOf, balances, cylinderAccount, MOVEMENT_KINDS } from './book.ts';

const movement = fc.record({
  kind: fc.constantFrom(...MOVEMENT_KINDS),
  cylinderId: fc.integer({ min: 1, max: 3 }),
  machineId: fc.integer({ min: 1, max: 3 }),
  grams: fc.integer({ min: 1, max: 5000 }),
});

test('whatever is entered, nothing is made and nothing vanishes', () => {
  fc.assert(
    fc.property(fc.array(movement), (movements) => {
      const entries = movements.map(({ kind, cylinderId, machineId, grams }) => {
        const { from, to } = accountsOf(kind, cylinderId, machineId);
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
  expect(held.get('machine:7')).toBe(0);
});

test('every kind moves between two different accounts', () => {
  for (const kind of MOVEMENT_KINDS) {
    const { from, to } = accountsOf(kind, 1, 2);
    expect(from).not.toBe(to);
  }
});
