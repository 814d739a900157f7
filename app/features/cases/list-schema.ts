import { z } from 'zod';
import { CASE_STATES } from '#app/domain/chain/chain.ts';

export const CASE_SORTS = ['number', 'opened', 'machine', 'state'] as const;

const id = z.coerce.number().int().positive().max(4_000_000_000).optional().catch(undefined);

/** The address of /cases. A bad value falls back. */
export const caseListSchema = z.object({
  state: z
    .enum([...CASE_STATES, 'unfinished'])
    .optional()
    .catch(undefined),
  medium: z.string().max(60).optional().catch(undefined),
  yard: id,
  machine: id,
  mine: z.literal('1').optional().catch(undefined),
  sort: z
    .string()
    .regex(/^-?(number|opened|machine|state)$/)
    .catch('-opened'),
  page: z.coerce.number().int().min(1).max(100_000).catch(1),
});
export type CaseListInput = z.infer<typeof caseListSchema>;

export function parseCaseList(params: URLSearchParams): CaseListInput {
  const given = Object.fromEntries([...params].filter(([, value]) => value !== ''));
  return caseListSchema.parse({ sort: '-opened', page: 1, ...given });
}
