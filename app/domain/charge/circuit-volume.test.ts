import { expect, test } from 'vitest';
import { estimateCircuitVolume } from './circuit-volume.ts';

const CAB = { refrigerant: 'R-134a', plateGrams: 1150, place: 'cab-front' };

/** NIST REFPROP, from memory: saturated liquid R-134a at 25 °C has 1,206.7 kg/m³, so 1,150 g are 0.953 l. */
test('the plate charge is three tenths of the volume as liquid', () => {
  expect(estimateCircuitVolume(CAB)).toEqual({
    litres: Number((0.953 / 0.3).toPrecision(2)),
    basis: expect.stringContaining('1,150 g'),
  });
});

test('twice the charge is twice the volume', () => {
  const { litres } = estimateCircuitVolume({ ...CAB, plateGrams: 2300 });
  expect(litres).toBeCloseTo(6.4, 6);
});

test.each([
  ['no plate', { plateGrams: null }, 3],
  ['a branch', { plateGrams: null, place: 'rear-sleeper' }, 6],
  ['no such place', { plateGrams: null, place: 'elsewhere' }, 3],
  ['an unknown refrigerant', { refrigerant: 'mystery gas', place: 'battery-cooling' }, 4],
])('%s: from the kind of circuit', (_what, change, litres) => {
  expect(estimateCircuitVolume({ ...CAB, ...change })).toEqual({
    litres,
    basis: expect.stringContaining('kind of circuit'),
  });
});
