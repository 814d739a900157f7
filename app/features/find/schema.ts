import { z } from 'zod';
import { CASE_STATES } from '#app/domain/chain/chain.ts';

export const LONGEST_QUERY = 5000;
export const PAGE_SIZE = 20;

const id = z
  .string()
  .max(60)
  .regex(/^[\w.-]+$/)
  .optional()
  .catch(undefined);

/** The address of /find. A bad value falls back; nothing here is an error. */
export const findSchema = z.object({
  q: z
    .string()
    .transform((text) => text.slice(0, LONGEST_QUERY))
    .catch(''),
  medium: id,
  machine: z.coerce.number().int().positive().max(4_000_000_000).optional().catch(undefined),
  yard: z.coerce.number().int().positive().max(4_000_000_000).optional().catch(undefined),
  component: id,
  failure: id,
  method: id,
  state: z.enum(CASE_STATES).optional().catch(undefined),
  year: z.coerce.number().int().min(1970).max(2200).optional().catch(undefined),
  page: z.coerce.number().int().min(1).max(1000).catch(1),
});
export type FindInput = z.infer<typeof findSchema>;

export function parseFind(params: URLSearchParams): FindInput {
  const given = Object.fromEntries([...params].filter(([, value]) => value !== ''));
  return findSchema.parse({ q: '', page: 1, ...given });
}

export const FACETS = [
  'medium',
  'state',
  'component',
  'failure',
  'method',
  'machine',
  'yard',
  'year',
] as const;
export type FacetName = (typeof FACETS)[number];

export const FACET_NAMES: Record<FacetName, string> = {
  medium: 'Medium',
  state: 'State',
  component: 'Part',
  failure: 'How it failed',
  method: 'Method',
  machine: 'Machine',
  yard: 'Yard',
  year: 'Opened in',
};
