import { MeasureField } from '#app/components/forms/field.tsx';
import { UNITS } from '#app/domain/units/units.ts';
import type { TypedMeasure } from '../inputs.ts';

type Props = { name: string; label: string; measure: TypedMeasure; optional?: boolean; error?: string };

/** A number with its unit, kept in the address as `name` and `nameUnit`. */
export function MeasureInput({ name, label, measure, optional, error }: Props) {
  return (
    <MeasureField
      name={name}
      unitName={`${name}Unit`}
      label={label}
      optional={optional}
      units={measure.units.map((value) => ({ value, label: UNITS[value].label }))}
      defaultValue={measure.typed}
      defaultUnit={measure.unit}
      error={measure.error ?? error}
    />
  );
}
