import { MeasureField, SelectField } from '#app/components/forms/field.tsx';
import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import { airPressurePa, HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import {
  REFRIGERANTS,
  SAFETY_GROUPS,
  saturationAt,
  saturationRange,
} from '#app/domain/refrigerant/saturation.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { fromSi, toSi, UNITS } from '#app/domain/units/units.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { MeasureInput } from '#app/features/reference/components/measure-input.tsx';
import { typedAltitude, typedChoice, typedNumber } from '#app/features/reference/inputs.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/pressures.ts';

const PRESSURE_UNITS = ['bar', 'psi', 'kPa'] as const;
const TEMPERATURE_UNITS = ['C', 'F'] as const;
const STEP_C = 5;

export const meta: Route.MetaFunction = () => [{ title: 'Pressures · Weepmark' }];

export function loader({ context, url }: Route.LoaderArgs) {
  const own = preferredUnits(requireActor(context).preferences);
  const params = url.searchParams;
  const first = <T extends string>(choices: readonly T[], wanted: string) =>
    [...choices].sort((x, y) => Number(y === wanted) - Number(x === wanted));
  const refrigerant = typedChoice(params, 'refrigerant', REFRIGERANTS);
  const pressureUnit = typedChoice(params, 'pressureUnit', first(PRESSURE_UNITS, own.pressure));
  const temperatureUnit = typedChoice(params, 'temperatureUnit', first(TEMPERATURE_UNITS, own.temperature));
  const temperature = typedNumber(params, 'temperature', temperatureUnit === 'C' ? '20' : '70', -60, 300);
  const altitude = typedAltitude(params, {
    temperature: own.temperature,
    least: LOWEST_M,
    most: HIGHEST_M,
  });
  const airPa = airPressurePa(altitude.value ?? 0);
  const gauge = (pascals: number) => fromSi(pascals - airPa, pressureUnit);
  const celsius = temperature.value === null ? null : toSi(temperature.value, temperatureUnit) - 273.15;
  const found = celsius === null ? null : saturationAt(refrigerant, celsius);
  const { fromC, toC } = saturationRange(refrigerant);
  const rows = [];
  for (let at = Math.ceil(fromC / STEP_C) * STEP_C; at <= toC; at += STEP_C) {
    const row = saturationAt(refrigerant, at);
    if ('error' in row) continue;
    rows.push({
      temperature: fromSi(at + 273.15, temperatureUnit),
      bubble: gauge(row.bubblePa),
      dew: gauge(row.dewPa),
    });
  }
  return {
    refrigerant,
    pressureUnit,
    temperatureUnit,
    temperature,
    altitude,
    rows,
    safety: SAFETY_GROUPS[refrigerant] ?? '',
    error: found && 'error' in found ? found.error : undefined,
    found:
      found && !('error' in found)
        ? {
            bubble: gauge(found.bubblePa),
            dew: gauge(found.dewPa),
            absoluteKPa: found.bubblePa / 1000,
            liquid: found.liquidKgPerM3,
            source: found.source,
          }
        : null,
  };
}

export default function Pressures({ loaderData }: Route.ComponentProps) {
  const { refrigerant, pressureUnit, temperatureUnit, temperature, altitude, rows, found, error, safety } =
    loaderData;
  const [p, t] = [UNITS[pressureUnit].label, UNITS[temperatureUnit].label];
  const figure = (value: number) => value.toFixed(pressureUnit === 'bar' ? 2 : 1);
  const glide = found !== null && Math.abs(found.bubble - found.dew) > 0.001 * Math.abs(found.bubble);
  return (
    <Calculator
      title="Pressures"
      lead="The pressure at which a refrigerant boils at a temperature. What a gauge shows while liquid is inside and nothing runs."
      formKey={JSON.stringify([
        refrigerant,
        temperature.typed,
        altitude.typed,
        pressureUnit,
        temperatureUnit,
      ])}
      result={
        <>
          {found && (
            <Facts
              facts={[
                {
                  label: glide ? 'Bubble pressure, gauge' : 'Saturation pressure, gauge',
                  value: `${figure(found.bubble)} ${p}`,
                },
                { label: 'Dew pressure, gauge', value: glide ? `${figure(found.dew)} ${p}` : '' },
                { label: 'Absolute', value: `${found.absoluteKPa.toFixed(1)} kPa` },
                { label: 'Saturated liquid', value: `${found.liquid.toFixed(0)} kg/m³` },
                { label: 'Safety group', value: safety },
              ]}
            />
          )}
          {safety !== 'A1' && (
            <Notice tone="warn" title={`${refrigerant} burns (group ${safety})`}>
              <p>
                Ventilate, no hot work or smoking, equipment rated for this refrigerant. Groups from memory of
                the standard: the plate and the safety data sheet come first.
              </p>
            </Notice>
          )}
          <LinePlot
            title={`Saturation pressure of ${refrigerant}`}
            description={`Gauge pressure of ${refrigerant} against temperature${glide ? ', bubble as a full line, dew dashed' : ''}, at ${altitude.typed || 0} m.`}
            xLabel={`Temperature, ${t}`}
            yLabel={`Gauge pressure, ${p}`}
            curves={[
              {
                name: 'bubble',
                look: 'main',
                points: rows.map((row) => ({ x: row.temperature, y: row.bubble })),
              },
              ...(glide
                ? [
                    {
                      name: 'dew',
                      look: 'second' as const,
                      points: rows.map((row) => ({ x: row.temperature, y: row.dew })),
                    },
                  ]
                : []),
            ]}
            marks={
              found && temperature.value !== null
                ? [{ name: `${figure(found.bubble)} ${p}`, x: temperature.value, y: found.bubble }]
                : []
            }
          />
          <details>
            <summary className="tap flex items-center font-semibold text-action">The same as a table</summary>
            <table className="figures w-full max-w-md text-right">
              <caption className="sr-only">Saturation pressure of {refrigerant}</caption>
              <thead>
                <tr className="border-b border-edge">
                  <th scope="col">{t}</th>
                  <th scope="col">Bubble, {p}</th>
                  <th scope="col">Dew, {p}</th>
                </tr>
              </thead>
              <tbody>
                {rows.map((row) => (
                  <tr key={row.temperature} className="border-b border-line">
                    <th scope="row">{row.temperature.toFixed(0)}</th>
                    <td>{figure(row.bubble)}</td>
                    <td>{figure(row.dew)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </details>
          {found && <p className="text-sm text-muted">Source: {found.source}</p>}
        </>
      }
    >
      <SelectField
        name="refrigerant"
        label="Refrigerant"
        options={REFRIGERANTS.map((value) => ({ value, label: value }))}
        defaultValue={refrigerant}
      />
      <MeasureField
        name="temperature"
        unitName="temperatureUnit"
        label="Temperature"
        units={TEMPERATURE_UNITS.map((value) => ({ value, label: UNITS[value].label }))}
        defaultValue={temperature.typed}
        defaultUnit={temperatureUnit}
        error={temperature.error ?? error}
      />
      <MeasureInput name="altitude" label="Altitude" measure={altitude} />
      <SelectField
        name="pressureUnit"
        label="Gauge"
        options={PRESSURE_UNITS.map((value) => ({ value, label: UNITS[value].label }))}
        defaultValue={pressureUnit}
      />
    </Calculator>
  );
}
