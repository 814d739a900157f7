import { expect, test } from 'vitest';
import { PIPES, REFRIGERANT_SPOTS } from './refrigerant-circuit.ts';

test('what belongs to a second branch, and nothing else, is drawn as one', () => {
  expect(REFRIGERANT_SPOTS.filter(({ branch }) => branch).map(({ id }) => id)).toEqual([
    'rear-circuit-joint',
    'branch-solenoid',
    'rear-evaporator',
    'roof-line-joint',
    'battery-chiller',
  ]);
});

test('the pipes of the main circuit and of the branch, by side', () => {
  expect(PIPES.map(({ side, branch }) => `${side}${branch ? ', branch' : ''}`)).toEqual([
    'low',
    'high',
    'high',
    'high, branch',
    'low, branch',
    'high, branch',
    'low, branch',
  ]);
  for (const { path } of PIPES) expect(path).toMatch(/^M\d/);
});
