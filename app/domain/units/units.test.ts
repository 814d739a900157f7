import { describe, expect, test } from 'vitest';
import published from '#tests/reference/units.json' with { type: 'json' };
import { fromSi, isUnit, parseTypedNumber, toSi, UNITS, type UnitId, unitLabel, unitsOf } from './units.ts';

const worked = new Map(published.worked_examples.map(({ question, answer }) => [question, answer]));

/** NIST Special Publication 811 (2008), appendix B.8, as copied into tests/reference/units.json. */
const FACTORS: [UnitId, number, number][] = [
  ['psi', published.factors.Pa_per_psi.value, published.factors.Pa_per_psi.sp811],
  ['bar', published.factors.Pa_per_bar.value, published.factors.Pa_per_bar.sp811],
  [
    'inHg',
    -published.factors.Pa_per_inHg_conventional.value,
    -published.factors.Pa_per_inHg_conventional.sp811,
  ],
];

describe('units', () => {
  test.each(FACTORS)('%s has the factor of NIST SP 811', (unit, exact, printed) => {
    expect(UNITS[unit].factor).toBeCloseTo(exact, 9);
    expect(UNITS[unit].factor / printed).toBeCloseTo(1, 6);
  });

  test.each([
    ['45 psig to kPa gauge', fromSi(toSi(45, 'psi'), 'kPa')],
    ['500 micron to Pa', toSi(500, 'micron')],
    ['80 F to C', fromSi(toSi(80, 'F'), 'C')],
    ['-40 F to C', fromSi(toSi(-40, 'F'), 'C')],
    ['12 oz to g', fromSi(toSi(12, 'oz'), 'g')],
    ['30 lb to kg', fromSi(toSi(30, 'lb'), 'kg')],
    ['8 US fl oz to mL', fromSi(toSi(8, 'floz'), 'ml')],
    ['10 bar to psi', fromSi(toSi(10, 'bar'), 'psi')],
    ['1 inHg (conventional) to psi', -fromSi(toSi(1, 'inHg'), 'psi')],
  ])('worked example of the reference data: %s', (question, answer) => {
    const expected = worked.get(question);
    expect(expected).toBeDefined();
    expect(answer).toBeCloseTo(expected as number, 6);
  });

  test('every unit goes to SI and back', () => {
    for (const quantity of ['pressure', 'temperature', 'mass', 'volume', 'length'] as const) {
      for (const unit of unitsOf(quantity)) expect(fromSi(toSi(12.5, unit), unit)).toBeCloseTo(12.5, 9);
    }
  });
});

test('each quantity has its own units', () => {
  expect(unitsOf('pressure')).toEqual(['psi', 'bar', 'kPa', 'inHg', 'micron', 'mbar']);
  expect(unitsOf('temperature')).toEqual(['C', 'F']);
  expect(unitsOf('mass')).toEqual(['g', 'kg', 'oz', 'lb']);
  expect(unitsOf('volume')).toEqual(['ml', 'l', 'floz', 'gal']);
  expect(unitsOf('length')).toEqual(['m', 'ft', 'mm', 'in']);
});

test('a unit is known by its id; what is no unit is shown as it is', () => {
  expect([isUnit('psi'), isUnit('toString'), isUnit('')]).toEqual([true, false, false]);
  expect([unitLabel('inHg'), unitLabel('furlong')]).toEqual(['inHg vacuum', 'furlong']);
});

/** The international foot and inch are exact by definition (NIST SP 811, appendix B.8). */
test('lengths', () => {
  expect(toSi(1, 'ft')).toBeCloseTo(0.3048, 12);
  expect(toSi(1, 'in')).toBeCloseTo(0.0254, 12);
  expect(toSi(12, 'in')).toBeCloseTo(toSi(1, 'ft'), 12);
});

describe('typed numbers', () => {
  test.each([
    ['12', 12],
    ['12,5', 12.5],
    ['12.5', 12.5],
    ['.5', 0.5],
    ['-29.5', -29.5],
    ['−4', -4],
    ['1,150', 1150],
    ['0,250', 0.25],
    ['1 150', 1150],
    ['12,345.6', 12345.6],
    ['1,234,567', 1234567],
    ['1,234.56', 1234.56],
    [' 7 ', 7],
    ['12.', 12],
    ['120,', 120],
    ['+5', 5],
    ['-1,150', -1150],
    ['-0,250', -0.25],
    ['10,150', 10150],
    ['12.75', 12.75],
  ])('%s', (typed, value) => expect(parseTypedNumber(typed)).toBe(value));

  test.each(['', 'abc', '1.2.3', '12 psi', '1e3', 'Infinity', '--3', ','])('%j is no number', (typed) =>
    expect(parseTypedNumber(typed)).toBeNull(),
  );
});
