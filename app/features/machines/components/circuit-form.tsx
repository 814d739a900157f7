import { Form, useNavigation } from 'react-router';
import {
  MeasureField,
  type OptionGroup,
  SelectField,
  TextArea,
  TextField,
} from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { type Refusal, versionToSend } from '#app/features/outcome.ts';

type Props = {
  values: Record<string, string>;
  version?: number;
  refusal: Refusal | undefined;
  groups: OptionGroup[];
  units: { value: string; label: string }[];
  refrigerants: string[];
  save: string;
};

export function CircuitForm({ values, version, refusal, groups, units, refrigerants, save }: Props) {
  const pending = useNavigation().formMethod === 'POST';
  const errors = refusal?.refused === 'fields' ? refusal.fields : {};
  const field = (name: string) => ({ name, defaultValue: values[name] ?? '', error: errors[name] });
  return (
    <Form method="post" className="max-w-3xl space-y-5" noValidate>
      {version !== undefined && (
        <input type="hidden" name="version" value={versionToSend(refusal, version)} />
      )}
      <RefusalNotice refusal={refusal} />
      <div className="grid gap-5 sm:grid-cols-2">
        <SelectField {...field('circuit')} label="Circuit" blank="Choose" groups={groups} />
        <TextField
          {...field('label')}
          label="Own name for it"
          optional
          hint="When the machine has two alike."
        />
        <TextField
          {...field('refrigerant')}
          label="Refrigerant"
          optional
          list="refrigerants"
          hint="As the plate says; only for refrigerant circuits."
        />
        <MeasureField
          name="plateCharge"
          unitName="plateChargeUnit"
          label="Charge on the plate, or fill"
          optional
          units={units}
          defaultValue={values.plateCharge}
          defaultUnit={values.plateChargeUnit}
          error={errors.plateCharge}
          unitError={errors.plateChargeUnit}
        />
        <TextField {...field('oil')} label="Oil or fluid" optional />
        <SelectField
          {...field('metering')}
          label="Metering device"
          blank="Not known, or none"
          options={[
            { value: 'expansion-valve', label: 'Expansion valve' },
            { value: 'orifice', label: 'Fixed orifice' },
          ]}
        />
      </div>
      <TextArea
        {...field('portsText')}
        label="Where the service ports are and how to reach them"
        optional
        hint="Behind which cover, from which side, with what tool. The next person will thank you."
      />
      <datalist id="refrigerants">
        {refrigerants.map((name) => (
          <option key={name} value={name} />
        ))}
      </datalist>
      <Button pending={pending}>{save}</Button>
    </Form>
  );
}
