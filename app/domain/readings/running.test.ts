import { expect, test } from 'vitest';
import { readRunning } from './running.ts';

const WINDOW = { lowPa: [100, 200], highPa: [1000, 2000], source: 'made up' } as const;

/** What the pairs usually mean. Common practice, no source. */
test.each([
  [50, 500, ['Low charge', 'Restriction before the valve']],
  [50, 1500, ['Restriction, or the valve shut too far', 'Poor airflow over the evaporator']],
  [50, 2500, ['Restriction on the high side']],
  [150, 500, ['Cool day, or a compressor that pumps little']],
  [150, 1500, ['Within the window']],
  [150, 2500, ['Poor airflow over the condenser', 'Air in the circuit']],
  [250, 500, ['Weak compressor', 'Valve stuck open']],
  [250, 1500, ['Valve open too far']],
  [250, 2500, ['Too much charge', 'Poor airflow over the condenser', 'Air in the circuit']],
])('low side %d, high side %d', (low, high, names) => {
  const { meanings } = readRunning(low, high, WINDOW);
  expect(meanings.map(({ name }) => name)).toEqual(names);
  for (const { reason, next } of meanings) {
    expect(reason).toMatch(/\.$/);
    expect(next).toMatch(/[.?]/);
  }
});

test('the edges of the window are within it', () => {
  expect(readRunning(100, 1000, WINDOW)).toMatchObject({ low: 'usual', high: 'usual' });
  expect(readRunning(200, 2000, WINDOW)).toMatchObject({ low: 'usual', high: 'usual' });
});
