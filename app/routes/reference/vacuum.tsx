import { TextField } from '#app/components/forms/field.tsx';
import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import { airPressurePa, HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { fromSi, UNITS } from '#app/domain/units/units.ts';
import { waterVapourPa } from '#app/domain/water/vapour-pressure.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { MeasureInput } from '#app/features/reference/components/measure-input.tsx';
import { typedAltitude, typedCelsius, typedNumber } from '#app/features/reference/inputs.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/vacuum.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Vacuum and altitude · Weepmark' }];

const INCH_PA = -UNITS.inHg.factor;
const inHg = (pascals: number) => pascals / INCH_PA;

export function loader({ context, url }: Route.LoaderArgs) {
  const own = preferredUnits(requireActor(context).preferences).temperature;
  const altitude = typedAltitude(url.searchParams, {
    temperature: own,
    least: LOWEST_M,
    most: HIGHEST_M,
  });
  const ambient = typedCelsius(url.searchParams, 'ambient', {
    own,
    otherwise: { C: '20', F: '68' },
    least: -40,
    most: 80,
  });
  const air = altitude.value === null ? null : airPressurePa(altitude.value);
  const target = typedNumber(url.searchParams, 'target', '', 0, 32);
  const beyond = air !== null && target.value !== null && target.value > inHg(air);
  return {
    altitude,
    ambient,
    target: beyond
      ? { ...target, error: `No gauge can get there here: use at most ${inHg(air).toFixed(1)} inHg.` }
      : target,
    /** Air that would be left at the target, in micron. */
    leftMicron:
      air === null || target.value === null || beyond ? null : fromSi(air - target.value * INCH_PA, 'micron'),
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
  loaderData: { altitude, ambient, target, leftMicron, airKPa, deepestInHg, waterMicron, points },
}: Route.ComponentProps) {
  return (
    <Calculator
      title="Vacuum and altitude"
      lead="How deep a vacuum gauge can go here: no deeper than the air outside weighs. And the pressure below which water boils off."
      formKey={[altitude.typed, altitude.unit, ambient.typed, ambient.unit, target.typed].join(' ')}
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
              {
                label: 'Left inside at the target',
                value:
                  leftMicron === null
                    ? ''
                    : `${Math.round(leftMicron).toLocaleString('en-GB')} micron of air`,
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
      <MeasureInput name="altitude" label="Altitude" measure={altitude} />
      <MeasureInput name="ambient" label="Circuit’s temperature" measure={ambient} />
      <TextField
        name="target"
        label="Target on a compound gauge, inHg"
        optional
        inputMode="decimal"
        defaultValue={target.typed}
        error={target.error}
      />
    </Calculator>
  );
}
