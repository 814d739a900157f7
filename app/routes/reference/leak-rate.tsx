import { TextField } from '#app/components/forms/field.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import {
  annualizingRate,
  gramsLostPerYear,
  rollingAverageRate,
  THRESHOLDS,
} from '#app/domain/leak-rate/leak-rate.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { MeasureInput } from '#app/features/reference/components/measure-input.tsx';
import { typedMeasure, typedNumber } from '#app/features/reference/inputs.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/leak-rate.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Leak rate · Weepmark' }];

const MASS_UNITS = ['g', 'kg', 'oz', 'lb'] as const;
type MassUnit = (typeof MASS_UNITS)[number];

export function loader({ context, url }: Route.LoaderArgs) {
  const own = preferredUnits(requireActor(context).preferences).mass;
  const weight = (name: string, least: number, otherwise: Partial<Record<MassUnit, string>> = {}) =>
    typedMeasure(url.searchParams, name, { units: MASS_UNITS, own, otherwise, least, most: 1e5 });
  const charge = weight('charge', 1e-6, { g: '1150', kg: '1.15', oz: '40.6', lb: '2.54' });
  const added = weight('added', 0);
  const year = weight('year', 0);
  const days = typedNumber(url.searchParams, 'days', '', 0.5, 36_500);
  const known = charge.value !== null && added.value !== null && days.value !== null;
  return {
    charge,
    added,
    year,
    days,
    rates: known
      ? {
          annualizing: annualizingRate(added.value ?? 0, charge.value ?? 1, days.value ?? 1),
          rolling: year.value === null ? null : rollingAverageRate([year.value], charge.value ?? 1),
          grams: gramsLostPerYear((added.value ?? 0) * 1000, days.value ?? 1),
        }
      : null,
  };
}

export default function LeakRate({ loaderData: { charge, added, year, days, rates } }: Route.ComponentProps) {
  return (
    <Calculator
      title="Leak rate"
      lead="From what had to be added: in grams a year, and in per cent of the charge by the two methods of a rule that large plants fall under."
      formKey={JSON.stringify([charge, added, year, days.typed])}
      result={
        <>
          {rates ? (
            <Facts
              facts={[
                { label: 'Lost', value: `about ${Math.round(rates.grams).toLocaleString('en-GB')} g a year` },
                { label: 'Annualizing method', value: `${rates.annualizing.toFixed(1)} % a year` },
                {
                  label: 'Rolling average',
                  value: rates.rolling === null ? '' : `${rates.rolling.toFixed(1)} % a year`,
                },
              ]}
            />
          ) : (
            <p className="text-muted">Write what was added and how many days after the time before.</p>
          )}
          <div className="space-y-2 text-sm">
            <p>
              Methods of 40 CFR 82.152. Thresholds of 82.157(c)(2), each to be gone over, not met:{' '}
              {THRESHOLDS.map(({ use, percent }) => `${use.toLowerCase()} ${percent} %`).join(', ')}.
            </p>
            <p>
              They apply to appliances of 50 lb and more with ozone-depleting refrigerant; since 2026 40 CFR
              84.106 takes the methods over for 15 lb and more of HFC. A cab circuit of one or two kilograms
              lies below every threshold, so per cent a year is a poor yardstick there: grams a year say more.
              How mobile circuits are treated could not be verified. Your local law comes first.
            </p>
          </div>
        </>
      }
    >
      <MeasureInput name="charge" label="Full charge" measure={charge} />
      <MeasureInput name="added" label="Added this time" measure={added} />
      <TextField
        name="days"
        label="Days since it was last added to"
        inputMode="numeric"
        defaultValue={days.typed}
        error={days.error}
      />
      <MeasureInput name="year" label="Added in the past 365 days" optional measure={year} />
    </Calculator>
  );
}
