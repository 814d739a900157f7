import { NotFound } from '#app/features/outcome.ts';
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
