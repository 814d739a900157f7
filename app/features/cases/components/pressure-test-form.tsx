import { Form, useNavigation } from 'react-router';
import { SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { UNITS } from '#app/domain/units/units.ts';
import type { LinkActionData } from '../link-action.server.ts';
import { RefusalNotice } from './refusal-notice.tsx';

const GAUGES = (['bar', 'psi', 'kPa'] as const).map((value) => ({ value, label: UNITS[value].label }));

type Props = { actionData: LinkActionData | undefined; count: number; ambient: string };

/** A test with dry nitrogen: pressures and temperatures at both ends; cooling is taken out before the verdict. */
export function PressureTestForm({ actionData, count, ambient }: Props) {
  const mine = actionData?.form === 'pressure-test' ? actionData : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  const pending = useNavigation().formData?.get('intent') === 'pressure-test';
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
        Add a pressure test with dry nitrogen
      </summary>
      <Form method="post" className="space-y-5 px-4 pb-4" noValidate>
        <RefusalNotice refusal={mine?.refusal} />
        <div className="grid gap-5 sm:grid-cols-2">
          <TextField {...field('startPressure')} label="Gauge at the start" inputMode="decimal" />
          <TextField {...field('endPressure')} label="Gauge at the end" inputMode="decimal" />
          <SelectField {...field('pressureUnit')} label="Gauge" options={GAUGES} />
          <TextField
            {...field('pressureStep', '0.1')}
            label="Smallest step you can read"
            inputMode="decimal"
          />
          <TextField
            {...field('startC', ambient)}
            label="Temperature at the start in °C"
            inputMode="decimal"
          />
          <TextField {...field('endC', ambient)} label="Temperature at the end in °C" inputMode="decimal" />
          <TextField {...field('pressureMinutes', '30')} label="Minutes" inputMode="numeric" />
        </div>
        <TextArea {...field('note')} label="In words" optional rows={2} />
        <Button name="intent" value="pressure-test" pending={pending}>
          Work it out and record it
        </Button>
      </Form>
    </details>
  );
}
