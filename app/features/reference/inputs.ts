import { parseTypedNumber } from '#app/domain/units/units.ts';

export type Typed = { typed: string; value: number | null; error?: string };

/** A number out of an address, as typed; empty is `otherwise`, what is no number or lies outside says so. */
export function typedNumber(
  params: URLSearchParams,
  name: string,
  otherwise: string,
  least: number,
  most: number,
): Typed {
  const typed = (params.get(name) ?? otherwise).slice(0, 40);
  if (typed === '') return { typed, value: null };
  const value = parseTypedNumber(typed);
  if (value === null) return { typed, value: null, error: 'Write this as a number, like 12.5.' };
  if (value < least || value > most) {
    return {
      typed,
      value: null,
      error: `Use ${least.toLocaleString('en-GB')} to ${most.toLocaleString('en-GB')}.`,
    };
  }
  return { typed, value };
}

/** One of a few words out of an address; anything else is the first. */
export function typedChoice<T extends string>(
  params: URLSearchParams,
  name: string,
  choices: readonly T[],
): T {
  return choices.find((choice) => choice === params.get(name)) ?? (choices[0] as T);
}
