import type { Quantity } from '../units/units.ts';

export type ReadingKind = {
  id: string;
  name: string;
  quantity: Quantity;
  media: readonly string[];
  hint?: string;
};

/** What is read off a machine. Kinds without media belong to every medium. Names are common practice, no source. */
export const READING_KINDS: readonly ReadingKind[] = [
  {
    id: 'standing-pressure',
    name: 'Standing pressure',
    quantity: 'pressure',
    media: [],
    hint: 'Engine off, machine soaked to one temperature.',
  },
  { id: 'low-side-pressure', name: 'Low side, running', quantity: 'pressure', media: ['refrigerant'] },
  { id: 'high-side-pressure', name: 'High side, running', quantity: 'pressure', media: ['refrigerant'] },
  { id: 'vacuum-pressure', name: 'Vacuum', quantity: 'pressure', media: ['refrigerant'] },
  {
    id: 'running-pressure',
    name: 'Working pressure, running',
    quantity: 'pressure',
    media: ['hydraulic-oil', 'engine-oil', 'coolant', 'fuel', 'compressed-air', 'gear-oil'],
  },
  { id: 'ambient-temperature', name: 'Air outside', quantity: 'temperature', media: [] },
  { id: 'vent-temperature', name: 'Air at the vent', quantity: 'temperature', media: ['refrigerant'] },
  { id: 'suction-line-temperature', name: 'Suction line', quantity: 'temperature', media: ['refrigerant'] },
  { id: 'liquid-line-temperature', name: 'Liquid line', quantity: 'temperature', media: ['refrigerant'] },
  {
    id: 'fluid-temperature',
    name: 'Fluid',
    quantity: 'temperature',
    media: ['hydraulic-oil', 'engine-oil', 'coolant', 'fuel', 'gear-oil'],
  },
];

const BY_ID = new Map(READING_KINDS.map((kind) => [kind.id, kind]));

export function readingKind(id: string): ReadingKind | undefined {
  return BY_ID.get(id);
}

export function readingKindsFor(medium: string): ReadingKind[] {
  return READING_KINDS.filter(({ media }) => media.length === 0 || media.includes(medium));
}
