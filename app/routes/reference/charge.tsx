import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Cautions, Notice } from '#app/components/ui/notice.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import { COMMON_PRACTICE, chargeWindow } from '#app/domain/charge/charge-window.ts';
import { readRunning } from '#app/domain/readings/running.ts';
import { REFRIGERANTS } from '#app/domain/refrigerant/saturation.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { fromSi, toSi, UNITS } from '#app/domain/units/units.ts';
import { cautionsFor } from '#app/domain/vocabulary/vocabulary.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { MeasureInput } from '#app/features/reference/components/measure-input.tsx';
import { typedCelsius, typedChoice, typedNumber } from '#app/features/reference/inputs.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/charge.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Charge · Weepmark' }];

const PRESSURE_UNITS = ['psi', 'bar', 'kPa'] as const;

export function loader({ context, url }: Route.LoaderArgs) {
  const own = preferredUnits(requireActor(context).preferences);
  const params = url.searchParams;
  const refrigerant = typedChoice(params, 'refrigerant', REFRIGERANTS);
  const unit = typedChoice(
    params,
    'unit',
    [...PRESSURE_UNITS].sort((x, y) => Number(y === own.pressure) - Number(x === own.pressure)),
  );
  const ambient = typedCelsius(params, 'ambient', {
    own: own.temperature,
    otherwise: { C: '27', F: '80' },
    least: -50,
    most: 80,
  });
  const low = typedNumber(params, 'low', '', -15, 1000);
  const high = typedNumber(params, 'high', '', -15, 6000);
  const found = ambient.value === null ? null : chargeWindow(refrigerant, ambient.value);
  const window = found && !('error' in found) ? found : null;
  const inUnit = (pair: readonly [number, number]) =>
    pair.map((pascals) => fromSi(pascals, unit)) as [number, number];
  const reading =
    window && low.value !== null && high.value !== null
      ? readRunning(toSi(low.value, unit), toSi(high.value, unit), window)
      : null;
  return {
    refrigerant,
    unit,
    ambient,
    low,
    high,
    reading,
    error: found && 'error' in found ? found.error : undefined,
    window: window && { low: inUnit(window.lowPa), high: inUnit(window.highPa), source: window.source },
  };
}

export default function Charge({ loaderData }: Route.ComponentProps) {
  const { refrigerant, unit, ambient, low, high, window, reading, error } = loaderData;
  const span = ([from, to]: [number, number]) =>
    `${from.toFixed(unit === 'bar' ? 1 : 0)} to ${to.toFixed(unit === 'bar' ? 1 : 0)} ${UNITS[unit].label}`;
  return (
    <Calculator
      title="Charge"
      lead="Running pressures against the air outside, and what a pair of readings usually means. Weight is the only sure measure of a charge."
      formKey={JSON.stringify(loaderData)}
      result={
        <>
          <Cautions cautions={cautionsFor('charge', 'refrigerant')} />
          {error && (
            <Notice tone="warn" title="No window for this">
              <p>{error}</p>
            </Notice>
          )}
          {window && (
            <>
              <Facts
                facts={[
                  { label: 'Low side, running', value: span(window.low) },
                  { label: 'High side, running', value: span(window.high) },
                ]}
              />
              <LinePlot
                title="Low against high side"
                description={`The published window of ${refrigerant} at ${ambient.typed} ${UNITS[ambient.unit].label} as a box${reading ? ', and your pair of readings' : ''}.`}
                xLabel={`Low side, ${UNITS[unit].label}`}
                yLabel={`High side, ${UNITS[unit].label}`}
                curves={[{ name: 'origin', look: 'second', points: [{ x: 0, y: 0 }] }]}
                boxes={[{ name: 'window', x: window.low, y: window.high }]}
                marks={
                  low.value !== null && high.value !== null
                    ? [{ name: 'yours', x: low.value, y: high.value }]
                    : []
                }
              />
              <p className="text-sm text-muted">
                Source: {window.source}. {COMMON_PRACTICE}
              </p>
            </>
          )}
          {reading && (
            <ol className="list-decimal space-y-3 pl-6">
              {reading.meanings.map(({ name, reason, next }) => (
                <li key={name}>
                  <p className="font-semibold">{name}</p>
                  <p>
                    {reason} Check next: {next}
                  </p>
                </li>
              ))}
              <li className="list-none text-sm text-muted">Usual meanings: common practice, no source.</li>
            </ol>
          )}
        </>
      }
    >
      <SelectField
        name="refrigerant"
        label="Refrigerant"
        options={REFRIGERANTS.map((value) => ({ value, label: value }))}
        defaultValue={refrigerant}
      />
      <MeasureInput name="ambient" label="Air outside" measure={ambient} />
      <TextField
        name="low"
        label="Low side, running"
        optional
        inputMode="decimal"
        defaultValue={low.typed}
        error={low.error}
      />
      <TextField
        name="high"
        label="High side, running"
        optional
        inputMode="decimal"
        defaultValue={high.typed}
        error={high.error}
      />
      <SelectField
        name="unit"
        label="Gauge"
        options={PRESSURE_UNITS.map((value) => ({ value, label: UNITS[value].label }))}
        defaultValue={unit}
      />
    </Calculator>
  );
}
