import { expect, test } from 'vitest';
import { READING_KINDS, readingKind, readingKindsFor } from './readings.ts';

test('a refrigerant circuit is read on both sides, a coolant one at work', () => {
  const ids = (medium: string) => readingKindsFor(medium).map(({ id }) => id);
  expect(ids('refrigerant')).toEqual([
    'standing-pressure',
    'low-side-pressure',
    'high-side-pressure',
    'vacuum-pressure',
    'ambient-temperature',
    'vent-temperature',
    'suction-line-temperature',
    'liquid-line-temperature',
  ]);
  expect(ids('coolant')).toEqual([
    'standing-pressure',
    'running-pressure',
    'ambient-temperature',
    'fluid-temperature',
  ]);
  expect(ids('compressed-air')).toEqual(['standing-pressure', 'running-pressure', 'ambient-temperature']);
});

test('each kind is found by its id and measures what its id says', () => {
  for (const kind of READING_KINDS) {
    expect(readingKind(kind.id)).toBe(kind);
    expect(kind.id.endsWith(kind.quantity)).toBe(true);
    expect(kind.name).not.toBe('');
  }
  expect(readingKind('mood')).toBeUndefined();
});
