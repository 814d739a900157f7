import { TextField } from '#app/components/forms/field.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import {
  annualizingRate,
  gramsLostPerYear,
  rollingAverageRate,
  THRESHOLDS,
} from '#app/domain/leak-rate/leak-rate.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { typedNumber } from '#app/features/reference/inputs.ts';
import type { Route } from './+types/leak-rate.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Leak rate · Weepmark' }];

export function loader({ url }: Route.LoaderArgs) {
  const charge = typedNumber(url.searchParams, 'charge', '1150', 0.001, 1e8);
  const added = typedNumber(url.searchParams, 'added', '', 0, 1e8);
  const year = typedNumber(url.searchParams, 'year', '', 0, 1e8);
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
          grams: gramsLostPerYear(added.value ?? 0, days.value ?? 1),
        }
      : null,
  };
}

export default function LeakRate({ loaderData: { charge, added, year, days, rates } }: Route.ComponentProps) {
  return (
    <Calculator
      title="Leak rate"
      lead="From what had to be added: in grams a year, and in per cent of the charge by the two methods of a rule that large plants fall under."
      formKey={JSON.stringify([charge.typed, added.typed, year.typed, days.typed])}
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
      <TextField
        name="charge"
        label="Full charge in g"
        inputMode="decimal"
        defaultValue={charge.typed}
        error={charge.error}
      />
      <TextField
        name="added"
        label="Added this time in g"
        inputMode="decimal"
        defaultValue={added.typed}
        error={added.error}
      />
      <TextField
        name="days"
        label="Days since it was last added to"
        inputMode="numeric"
        defaultValue={days.typed}
        error={days.error}
      />
      <TextField
        name="year"
        label="Added in the past 365 days in g"
        optional
        inputMode="decimal"
        defaultValue={year.typed}
        error={year.error}
      />
    </Calculator>
  );
}
