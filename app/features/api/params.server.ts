import type { z } from 'zod';
import { fieldErrors } from '#app/features/form-fields.ts';
import { type FieldErrors, NotFound } from '#app/features/outcome.ts';
import { ApiError } from './api.server.ts';

/** An address part that must be a whole number; anything else names nothing. */
export function wholeParam(value: string | undefined): number {
  if (!value || !/^\d{1,9}$/.test(value)) throw new NotFound();
  return Number(value);
}

/** `?limit=` between 1 and 100. */
export function limitParam(params: URLSearchParams, otherwise: number): number {
  const given = params.get('limit');
  if (given === null) return otherwise;
  const limit = Number(given);
  if (Number.isInteger(limit) && limit >= 1 && limit <= 100) return limit;
  throw new ApiError(400, 'invalid', 'Some fields are missing or wrong.', {
    limit: 'Use a whole number from 1 to 100.',
  });
}

/** The query of an address, checked; empty parts count as not given. */
export function readQuery<T>(params: URLSearchParams, schema: z.ZodType<T>): T {
  const parsed = schema.safeParse(Object.fromEntries([...params].filter(([, value]) => value !== '')));
  if (parsed.success) return parsed.data;
  throw new ApiError(400, 'invalid', 'Some fields are missing or wrong.', fieldErrors(parsed.error));
}

/** A computed answer, or its refusal as an error of the API. */
export function answerOrRefuse<T>(answer: { ok: true; value: T } | { ok: false; fields: FieldErrors }): T {
  if (answer.ok) return answer.value;
  throw new ApiError(400, 'out_of_range', 'This cannot be computed.', answer.fields);
}
