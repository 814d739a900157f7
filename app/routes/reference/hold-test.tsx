import { SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Cautions, Notice } from '#app/components/ui/notice.tsx';
import { HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import { analyseHoldTest, FEWEST_SAMPLES } from '#app/domain/hold-test/hold-test.ts';
import { REFRIGERANTS } from '#app/domain/refrigerant/saturation.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { UNITS } from '#app/domain/units/units.ts';
import { cautionsFor } from '#app/domain/vocabulary/vocabulary.ts';
import { Calculator } from '#app/features/reference/components/calculator.tsx';
import { HoldResult } from '#app/features/reference/components/hold-result.tsx';
import { MeasureInput } from '#app/features/reference/components/measure-input.tsx';
import { HOLD_GAUGES, holdTestOf, USUAL_STEP } from '#app/features/reference/hold-input.ts';
import { typedAltitude, typedCelsius, typedChoice, typedNumber } from '#app/features/reference/inputs.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/hold-test.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Hold test · Weepmark' }];

const EXAMPLE = '0 400\n2 441\n4 487\n6 530\n8 576\n10 622\n12 665\n14 711\n16 757\n18 802\n20 846';

export function loader({ context, url }: Route.LoaderArgs) {
  const own = preferredUnits(requireActor(context).preferences).temperature;
  const params = url.searchParams;
  const gauge = typedChoice(params, 'gauge', HOLD_GAUGES);
  const refrigerant = typedChoice(params, 'refrigerant', REFRIGERANTS);
  const samples = (params.get('samples') ?? EXAMPLE).slice(0, 30_000).replaceAll('\r\n', '\n');
  const step = typedNumber(params, 'step', USUAL_STEP[gauge], 0.001, 1000);
  const litres = typedNumber(params, 'litres', '3', 0.01, 1000);
  const ambient = typedCelsius(params, 'ambient', {
    own,
    otherwise: { C: '20', F: '68' },
    least: -40,
    most: 80,
  });
  const altitude = typedAltitude(params, { temperature: own, least: LOWEST_M, most: HIGHEST_M });
  const complete =
    step.value !== null && litres.value !== null && ambient.value !== null && altitude.value !== null;
  const test = complete
    ? holdTestOf({
        samples,
        gauge,
        step: step.value ?? 1,
        litres: litres.value ?? 1,
        ambientC: ambient.value ?? 20,
        altitudeM: altitude.value ?? 0,
      })
    : null;
  const error = test && 'error' in test ? test.error : undefined;
  const ready = test && !('error' in test) ? test : null;
  const analysis = ready && analyseHoldTest(ready);
  return {
    gauge,
    refrigerant,
    samples,
    step,
    litres,
    ambient,
    altitude,
    error:
      error ?? (ready && !analysis ? `Give at least ${FEWEST_SAMPLES} readings over some time.` : undefined),
    result: ready && analysis ? { test: ready, analysis } : null,
  };
}

export default function HoldTestPage({ loaderData }: Route.ComponentProps) {
  const { gauge, refrigerant, samples, step, litres, ambient, altitude, error, result } = loaderData;
  return (
    <Calculator
      title="Hold test"
      lead="Paste times and readings of a vacuum hold. It says tight, moisture, leak or cannot tell, and the smallest leak that this test could have seen."
      formKey={JSON.stringify([
        samples,
        gauge,
        refrigerant,
        step.typed,
        litres.typed,
        ambient.typed,
        ambient.unit,
        altitude.typed,
        altitude.unit,
      ])}
      result={
        <>
          <Cautions cautions={cautionsFor('proof', 'refrigerant')} />
          {error && (
            <Notice tone="warn" title="Not enough to judge">
              <p>{error}</p>
            </Notice>
          )}
          {result && <HoldResult {...result} gauge={gauge} refrigerant={refrigerant} />}
        </>
      }
    >
      <TextArea
        name="samples"
        label="Minutes and reading, a line each"
        rows={10}
        className="figures"
        defaultValue={samples}
        error={error}
      />
      <SelectField
        name="gauge"
        label="Gauge"
        options={HOLD_GAUGES.map((value) => ({ value, label: UNITS[value].label }))}
        defaultValue={gauge}
      />
      <TextField
        name="step"
        label="Smallest step you can read"
        inputMode="decimal"
        defaultValue={step.typed}
        error={step.error}
      />
      <TextField
        name="litres"
        label="Circuit’s volume in litres"
        hint="If unknown: 2 to 4 for a cab, 6 with a second branch (common practice, no source)."
        inputMode="decimal"
        defaultValue={litres.typed}
        error={litres.error}
      />
      <MeasureInput name="ambient" label="Temperature" measure={ambient} />
      <MeasureInput name="altitude" label="Altitude" measure={altitude} />
      <SelectField
        name="refrigerant"
        label="Refrigerant"
        options={REFRIGERANTS.map((value) => ({ value, label: value }))}
        defaultValue={refrigerant}
      />
    </Calculator>
  );
}
