import { expect, test } from 'vitest';
import { preferredUnits } from './preferences.ts';

test('what a person has not chosen is bar, °C, g and l', () => {
  expect(preferredUnits({})).toEqual({ pressure: 'bar', temperature: 'C', mass: 'g', volume: 'l' });
  expect(preferredUnits({ units: { pressure: 'psi' } })).toEqual({
    pressure: 'psi',
    temperature: 'C',
    mass: 'g',
    volume: 'l',
  });
});
