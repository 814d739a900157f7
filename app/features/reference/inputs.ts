import { fromSi, parseTypedNumber, toSi, type UnitId } from '#app/domain/units/units.ts';

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

export type TypedMeasure<U extends UnitId = UnitId> = Typed & {
  /** In SI; `typed` stays as it was entered, in `unit`. */
  value: number | null;
  unit: U;
  units: readonly U[];
};

type Measure<U extends UnitId> = {
  /** What may be chosen; the person's own unit leads unless the address names another. */
  units: readonly U[];
  own?: UnitId;
  /** What stands in the field at first, for each unit. */
  otherwise?: Partial<Record<U, string>>;
  /** Bounds in SI. */
  least: number;
  most: number;
};

/** A number with its unit out of an address (`name` and `nameUnit`). */
export function typedMeasure<U extends UnitId>(
  params: URLSearchParams,
  name: string,
  { units, own, otherwise, least, most }: Measure<U>,
): TypedMeasure<U> {
  const first = [...units].sort((x, y) => Number(y === own) - Number(x === own));
  const unit = typedChoice(params, `${name}Unit`, first);
  const round = (si: number) => Number(fromSi(si, unit).toPrecision(4));
  const shared = { unit, units };
  const { typed, value, error } = typedNumber(params, name, otherwise?.[unit] ?? '', -1e9, 1e9);
  if (value === null) return { ...shared, typed, value, error };
  const si = toSi(value, unit);
  if (si < least || si > most) {
    const from = round(least).toLocaleString('en-GB');
    const to = round(most).toLocaleString('en-GB');
    return { ...shared, typed, value: null, error: `Use ${from} to ${to}.` };
  }
  return { ...shared, typed, value: si };
}

const ZERO_C = 273.15;

/** A temperature out of an address, its value in °C. */
export function typedCelsius(
  params: URLSearchParams,
  name: string,
  { own, otherwise, least, most }: Omit<Measure<'C' | 'F'>, 'units'>,
): TypedMeasure<'C' | 'F'> {
  const found = typedMeasure(params, name, {
    units: ['C', 'F'],
    own,
    otherwise,
    least: least + ZERO_C,
    most: most + ZERO_C,
  });
  return { ...found, value: found.value === null ? null : found.value - ZERO_C };
}

/** An altitude out of an address, in metres; feet go with degrees Fahrenheit. */
export function typedAltitude(
  params: URLSearchParams,
  { temperature, least, most }: { temperature: UnitId; least: number; most: number },
): TypedMeasure<'m' | 'ft'> {
  const own = temperature === 'F' ? 'ft' : 'm';
  return typedMeasure(params, 'altitude', {
    units: ['m', 'ft'],
    own,
    otherwise: { m: '0', ft: '0' },
    least,
    most,
  });
}
