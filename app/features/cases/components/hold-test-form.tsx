import { useState } from 'react';
import { Form, useNavigation } from 'react-router';
import { MeasureField, type Option, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { VolumeEstimate } from '#app/domain/charge/circuit-volume.ts';
import { UNITS } from '#app/domain/units/units.ts';
import { HOLD_GAUGES } from '#app/features/reference/hold-input.ts';
import type { LinkActionData } from '../link-action.server.ts';
import { HoldTimer } from './hold-timer.tsx';
import { OverrideField } from './override-field.tsx';
import { RefusalNotice } from './refusal-notice.tsx';

type Props = {
  number: number;
  actionData: LinkActionData | undefined;
  count: number;
  start: { ambient: string; altitude: string; volume: VolumeEstimate; temperatureUnits: Option[] };
  mayOverride: boolean;
};

/** A vacuum hold from its readings; what it shows is worked out from them. */
export function HoldTestForm({ number, actionData, count, start, mayOverride }: Props) {
  const mine = actionData?.form === 'hold-test' ? actionData : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  const storageKey = `weepmark-hold-${number}`;
  const [samples, setSamples] = useState(mine?.typed.samples ?? '');
  const pending = useNavigation().formData?.get('intent') === 'hold-test';
  const field = (name: string, otherwise = '') => ({
    name,
    defaultValue: mine?.typed[name] ?? otherwise,
    error: errors[name],
  });
  return (
    <details
      key={count}
      open={mine !== undefined}
      className="mt-5 rounded-xl border border-line bg-surface print:hidden"
    >
      <summary className="tap flex items-center px-4 py-2 font-semibold text-action">
        Add a vacuum hold by its readings
      </summary>
      <Form
        method="post"
        className="space-y-5 px-4 pb-4"
        noValidate
        onSubmit={() => localStorage.removeItem(storageKey)}
      >
        <RefusalNotice refusal={mine?.refusal} />
        <OverrideField refusal={mine?.refusal} mayOverride={mayOverride} />
        <HoldTimer storageKey={storageKey} onText={setSamples} />
        <TextArea
          name="samples"
          value={samples}
          onChange={(event) => setSamples(event.target.value)}
          error={errors.samples}
          label="Minutes and reading, a line each"
          hint="Minutes since the pump was shut off, a space, the gauge."
          rows={8}
          className="figures"
        />
        <div className="grid gap-5 sm:grid-cols-2">
          <SelectField
            {...field('gauge')}
            label="Gauge"
            options={HOLD_GAUGES.map((value) => ({ value, label: UNITS[value].label }))}
          />
          <TextField {...field('step', '1')} label="Smallest step you can read" inputMode="decimal" />
          <TextField
            {...field('litres', String(start.volume.litres))}
            label="Circuit’s volume in litres"
            hint={`${start.volume.basis} Use the maker’s figure where there is one.`}
            inputMode="decimal"
          />
          <MeasureField
            {...field('ambient', start.ambient)}
            unitName="ambientUnit"
            label="Temperature"
            units={start.temperatureUnits}
            defaultUnit={mine?.typed.ambientUnit}
          />
          <MeasureField
            {...field('altitude', start.altitude)}
            unitName="altitudeUnit"
            label="Altitude"
            units={[
              { value: 'm', label: UNITS.m.label },
              { value: 'ft', label: UNITS.ft.label },
            ]}
            defaultUnit={mine?.typed.altitudeUnit}
          />
        </div>
        <TextArea {...field('note')} label="In words" optional rows={2} />
        <Button name="intent" value="hold-test" pending={pending}>
          Work it out and record it
        </Button>
      </Form>
    </details>
  );
}
