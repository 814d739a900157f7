import { type ReactNode, useId } from 'react';
import { Form, useNavigation } from 'react-router';
import { MeasureField, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { UNITS, type UnitId } from '#app/domain/units/units.ts';
import type { FieldErrors } from '#app/features/outcome.ts';
import type { PressureTestKind } from '../computed-proofs.ts';
import type { LinkActionData } from '../link-action.server.ts';
import { RefusalNotice } from './refusal-notice.tsx';

const labelled = (ids: readonly UnitId[]) => ids.map((value) => ({ value, label: UNITS[value].label }));

const TITLES: Record<PressureTestKind, string> = {
  nitrogen: 'Add a pressure test with dry nitrogen',
  air: 'Add an air leak-down',
  kit: 'Add a test with the pump kit',
  ram: 'Add a leak-down of a loaded ram',
};

const HOW: Record<PressureTestKind, string> = {
  nitrogen:
    'Through a regulator, under the plate’s limit. What warming or cooling does is taken out before the verdict.',
  air: 'Charged, engine off, wheels chocked; let the needle settle first. In road rules for air brakes a loss of up to 2 psi a minute released and 3 psi applied passes for one vehicle, 3 and 4 psi for a combination; the machine’s own limit comes first.',
  kit: 'Pumped up to the cap’s rating, cold and then hot. Never open a hot system.',
  ram: 'Load held, engine off, nobody under it or in line with it. Mark the rod, wait, measure again.',
};

type Props = {
  kind: PressureTestKind;
  actionData: LinkActionData | undefined;
  count: number;
  ambient: string;
  units: { pressure: UnitId; temperature: UnitId };
};

/** The test of a medium under pressure; what temperature explains is taken out before the verdict. */
export function PressureTestForm({ kind, actionData, count, ambient, units }: Props) {
  const mine = actionData?.form === 'pressure-test' ? actionData : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  const pending = useNavigation().formData?.get('intent') === 'pressure-test';
  const inputs: Inputs = {
    errors,
    value: (name, otherwise = '') => mine?.typed[name] ?? otherwise,
    units,
    ambient,
  };
  const howId = useId();
  return (
    <details
      key={count}
      open={mine !== undefined}
      className="mt-5 rounded-xl border border-line bg-surface print:hidden"
    >
      <summary className="tap flex items-center px-4 py-2 font-semibold text-action">{TITLES[kind]}</summary>
      <Form method="post" className="space-y-5 px-4 pb-4" noValidate aria-describedby={howId}>
        <p id={howId} className="max-w-prose">
          {HOW[kind]}
        </p>
        <RefusalNotice refusal={mine?.refusal} />
        <div className="grid gap-5 sm:grid-cols-2">
          {kind === 'ram' ? <RamFields {...inputs} /> : <GaugeFields {...inputs} kind={kind} />}
          <NumberField {...inputs} name="pressureMinutes" label="Minutes" otherwise={USUAL_MINUTES[kind]} />
        </div>
        <TextArea
          name="note"
          label="In words"
          optional
          rows={2}
          defaultValue={inputs.value('note')}
          error={errors.note}
        />
        <Button name="intent" value="pressure-test" pending={pending}>
          Work it out and record it
        </Button>
      </Form>
    </details>
  );
}

const USUAL_MINUTES: Record<PressureTestKind, string> = { nitrogen: '30', air: '5', kit: '15', ram: '10' };

type Inputs = {
  errors: FieldErrors;
  value: (name: string, otherwise?: string) => string;
  units: Props['units'];
  ambient: string;
};

type NumberFieldProps = Inputs & {
  name: string;
  label: string;
  hint?: ReactNode;
  otherwise?: string;
  optional?: boolean;
};

function NumberField({ errors, value, name, label, hint, otherwise, optional }: NumberFieldProps) {
  return (
    <TextField
      name={name}
      label={label}
      hint={hint}
      optional={optional}
      inputMode="decimal"
      defaultValue={value(name, otherwise)}
      error={errors[name]}
    />
  );
}

function GaugeFields({ kind, ...inputs }: Inputs & { kind: PressureTestKind }) {
  const { errors, value, units } = inputs;
  return (
    <>
      <NumberField {...inputs} name="startPressure" label="Gauge at the start" />
      <NumberField {...inputs} name="endPressure" label="Gauge at the end" />
      <SelectField
        name="pressureUnit"
        label="Gauge"
        options={labelled(['bar', 'psi', 'kPa'])}
        defaultValue={value('pressureUnit', units.pressure)}
        error={errors.pressureUnit}
      />
      <NumberField
        {...inputs}
        name="pressureStep"
        label="Smallest step you can read"
        otherwise={units.pressure === 'psi' ? '1' : '0.1'}
      />
      <Temperatures {...inputs} />
      {kind !== 'kit' && (
        <NumberField
          {...inputs}
          name="litres"
          label="Volume under pressure in litres"
          optional
          hint="Then the loss is given as free air too."
        />
      )}
    </>
  );
}

function RamFields(inputs: Inputs) {
  const { errors, value, units } = inputs;
  const inches = units.temperature === 'F';
  return (
    <>
      <SelectField
        name="lengthUnit"
        label="Measured in"
        options={labelled(['mm', 'in'])}
        defaultValue={value('lengthUnit', inches ? 'in' : 'mm')}
        error={errors.lengthUnit}
      />
      <NumberField {...inputs} name="drift" label="How far it crept" />
      <NumberField
        {...inputs}
        name="driftStep"
        label="Smallest difference you can measure"
        otherwise={inches ? '0.04' : '1'}
      />
      <NumberField {...inputs} name="bore" label="Bore of the ram" />
      <NumberField
        {...inputs}
        name="rod"
        label="Rod, if the load hangs on its side"
        hint="Nothing when the load pushes the rod in."
        otherwise="0"
      />
      <NumberField
        {...inputs}
        name="column"
        label="Length of oil that carries the load"
        hint="The stroke it stands at."
      />
      <Temperatures {...inputs} />
    </>
  );
}

function Temperatures({ errors, value, units, ambient }: Inputs) {
  return (['start', 'end'] as const).map((end) => (
    <MeasureField
      key={end}
      name={`${end}Temperature`}
      unitName={`${end}TemperatureUnit`}
      label={`Temperature at the ${end}`}
      units={labelled(units.temperature === 'F' ? ['F', 'C'] : ['C', 'F'])}
      defaultValue={value(`${end}Temperature`, ambient)}
      defaultUnit={value(`${end}TemperatureUnit`, units.temperature)}
      error={errors[`${end}Temperature`]}
      unitError={errors[`${end}TemperatureUnit`]}
    />
  ));
}
