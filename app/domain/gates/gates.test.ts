import { describe, expect, test } from 'vitest';
import { chargeGates, evacuationGates } from './gates.ts';

const READY = {
  medium: 'refrigerant',
  provedTight: true,
  proofLacks: [],
  grams: 1000,
  sinceRecoveryGrams: 0,
  plateGrams: 1150,
};
const gatesOf = (change: Partial<typeof READY>) =>
  chargeGates({ ...READY, ...change }).map(({ gate }) => gate);

describe('charging', () => {
  test.each([
    ['proved tight and under the plate', {}, []],
    ['not proved', { provedTight: false }, ['charge-unproved']],
    ['past the plate', { grams: 1200 }, ['charge-past-plate']],
    [
      'past the plate with what went in before',
      { grams: 500, sinceRecoveryGrams: 800 },
      ['charge-past-plate'],
    ],
    ['within what a scale can tell', { grams: 1160 }, []],
    ['both', { provedTight: false, grams: 2000 }, ['charge-unproved', 'charge-past-plate']],
    ['another medium', { medium: 'coolant', provedTight: false, grams: 9999 }, []],
  ])('%s', (_what, change, gates) => expect(gatesOf(change)).toEqual(gates));

  test('a plate that is not known stops nothing', () => {
    expect(chargeGates({ ...READY, plateGrams: null, grams: 9000 })).toEqual([]);
  });
});

describe('evacuating', () => {
  test.each([
    [true, false, 1],
    [true, true, 0],
    [false, false, 0],
    [null, false, 0],
  ])('inside: %s, recovered: %s → %s gate', (refrigerantInside, recovered, count) => {
    expect(evacuationGates({ medium: 'refrigerant', refrigerantInside, recovered })).toHaveLength(count);
  });
});
