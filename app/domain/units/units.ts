/**
 * Units of the trade. Factors to SI are exact by definition (NIST Special Publication 811, 2008, appendix B.8;
 * the conventional inch of mercury). Pressures keep the reference of their gauge: psi, bar and kPa read against the
 * air outside, inches of mercury are vacuum below it (negative), microns are absolute.
 */
export type Quantity = 'pressure' | 'temperature' | 'mass' | 'volume' | 'length';

type Unit = {
  label: string;
  quantity: Quantity;
  factor: number;
  offset?: number;
  reference?: 'gauge' | 'absolute';
};

export const UNITS = {
  psi: { label: 'psi', quantity: 'pressure', factor: 6894.757293168362, reference: 'gauge' },
  bar: { label: 'bar', quantity: 'pressure', factor: 100_000, reference: 'gauge' },
  kPa: { label: 'kPa', quantity: 'pressure', factor: 1000, reference: 'gauge' },
  inHg: { label: 'inHg vacuum', quantity: 'pressure', factor: -3386.388640341, reference: 'gauge' },
  micron: {
    label: 'micron absolute',
    quantity: 'pressure',
    factor: 0.13332236842105263,
    reference: 'absolute',
  },
  mbar: { label: 'mbar absolute', quantity: 'pressure', factor: 100, reference: 'absolute' },
  C: { label: '°C', quantity: 'temperature', factor: 1, offset: 273.15 },
  F: { label: '°F', quantity: 'temperature', factor: 5 / 9, offset: 459.67 * (5 / 9) },
  g: { label: 'g', quantity: 'mass', factor: 0.001 },
  kg: { label: 'kg', quantity: 'mass', factor: 1 },
  oz: { label: 'oz', quantity: 'mass', factor: 0.028349523125 },
  lb: { label: 'lb', quantity: 'mass', factor: 0.45359237 },
  ml: { label: 'ml', quantity: 'volume', factor: 1e-6 },
  l: { label: 'l', quantity: 'volume', factor: 1e-3 },
  floz: { label: 'US fl oz', quantity: 'volume', factor: 29.5735295625e-6 },
  gal: { label: 'US gal', quantity: 'volume', factor: 3.785411784e-3 },
  m: { label: 'm', quantity: 'length', factor: 1 },
  ft: { label: 'ft', quantity: 'length', factor: 0.3048 },
  mm: { label: 'mm', quantity: 'length', factor: 0.001 },
  in: { label: 'in', quantity: 'length', factor: 0.0254 },
} as const satisfies Record<string, Unit>;

export type UnitId = keyof typeof UNITS;

export function isUnit(value: string): value is UnitId {
  return Object.hasOwn(UNITS, value);
}

export function unitsOf(quantity: Quantity): UnitId[] {
  return (Object.keys(UNITS) as UnitId[]).filter((id) => UNITS[id].quantity === quantity);
}

export function unitLabel(unit: string): string {
  return isUnit(unit) ? UNITS[unit].label : unit;
}

/** A value in `unit` as SI: Pa (in the unit's own reference), K, kg, m³ or m. */
export function toSi(value: number, unit: UnitId): number {
  const { factor, offset = 0 } = UNITS[unit] as Unit;
  return value * factor + offset;
}

/** An SI value (Pa in the unit's own reference, K, kg, m³, m) in `unit`. */
export function fromSi(si: number, unit: UnitId): number {
  const { factor, offset = 0 } = UNITS[unit] as Unit;
  return (si - offset) / factor;
}

/**
 * A number as typed on a phone: a decimal comma or point, spaces or commas between thousands, a sign.
 * Answers null for anything else.
 */
export function parseTypedNumber(typed: string): number | null {
  const text = typed
    .trim()
    .replace(/[\s\u00a0\u202f]/g, '')
    .replace('\u2212', '-');
  if (!/^[-+]?(\d{1,3}(,\d{3})+(\.\d+)?|\d*[.,]?\d+|\d+[.,])$/.test(text)) return null;
  const grouped = /^[-+]?\d{1,3}(,\d{3})+(\.\d+)?$/.test(text) && !/^[-+]?0,/.test(text);
  const value = Number(grouped ? text.replaceAll(',', '') : text.replace(',', '.'));
  return Number.isFinite(value) ? value : null;
}
