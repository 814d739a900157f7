import { TextField } from '#app/components/forms/field.tsx';
import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import { airPressurePa, HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import { fromSi } from '#app/domain/units/units.ts';
import { waterVapourPa } from '#app/domain/water/vapour-pressure.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { typedNumber } from '#app/features/reference/inputs.ts';
import type { Route } from './+types/vacuum.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Vacuum and altitude · Weepmark' }];

const inHg = (pascals: number) => -fromSi(pascals, 'inHg');

export function loader({ url }: Route.LoaderArgs) {
  const altitude = typedNumber(url.searchParams, 'altitude', '0', LOWEST_M, HIGHEST_M);
  const ambient = typedNumber(url.searchParams, 'ambient', '20', -40, 80);
  const air = altitude.value === null ? null : airPressurePa(altitude.value);
  return {
    altitude,
    ambient,
    airKPa: air === null ? null : air / 1000,
    deepestInHg: air === null ? null : inHg(air),
    waterMicron: ambient.value === null ? null : fromSi(waterVapourPa(ambient.value), 'micron'),
    points: Array.from({ length: 21 }, (_, place) => ({
      x: place * 200,
      y: inHg(airPressurePa(place * 200)),
    })),
  };
}

export default function Vacuum({
  loaderData: { altitude, ambient, airKPa, deepestInHg, waterMicron, points },
}: Route.ComponentProps) {
  return (
    <Calculator
      title="Vacuum and altitude"
      lead="How deep a vacuum gauge can go here: no deeper than the air outside weighs. And the pressure below which water boils off."
      formKey={`${altitude.typed} ${ambient.typed}`}
      result={
        <>
          <Facts
            facts={[
              {
                label: 'Deepest on a compound gauge',
                value: deepestInHg === null ? '' : `${deepestInHg.toFixed(1)} inHg`,
              },
              { label: 'Air outside', value: airKPa === null ? '' : `${airKPa.toFixed(1)} kPa` },
              {
                label: 'Water boils below',
                value:
                  waterMicron === null ? '' : `${Math.round(waterMicron).toLocaleString('en-GB')} micron`,
              },
            ]}
          />
          <LinePlot
            title="Deepest vacuum against altitude"
            description="The deepest reading of a compound gauge in inches of mercury, by the US Standard Atmosphere 1976. Weather moves it by about 3 per cent."
            xLabel="Altitude, m"
            yLabel="Deepest vacuum, inHg"
            curves={[{ name: 'deepest', look: 'main', points }]}
            marks={
              altitude.value !== null && deepestInHg !== null
                ? [{ name: `${deepestInHg.toFixed(1)} inHg`, x: altitude.value, y: deepestInHg }]
                : []
            }
          />
          <p className="text-sm text-muted">
            Sources: US Standard Atmosphere 1976; water by IAPWS SR1-86(1992) and R14-08(2011).
          </p>
        </>
      }
    >
      <TextField
        name="altitude"
        label="Altitude in m"
        inputMode="numeric"
        defaultValue={altitude.typed}
        error={altitude.error}
      />
      <TextField
        name="ambient"
        label="Circuit’s temperature in °C"
        inputMode="decimal"
        defaultValue={ambient.typed}
        error={ambient.error}
      />
    </Calculator>
  );
}
