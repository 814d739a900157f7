import { useState } from 'react';
import { MeasureField, RadioCards, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import {
  CERTAINTIES,
  CERTAINTY_NAMES,
  CHARGE_KIND_NAMES,
  CHARGE_KINDS,
  METHOD_OUTCOME_NAMES,
  METHOD_OUTCOMES,
  PROOF_VERDICT_NAMES,
  PROOF_VERDICTS,
} from '#app/domain/chain/evidence.ts';
import type { FieldErrors } from '#app/features/outcome.ts';
import type { LinkChoices } from '../choices.ts';
import type { EntryKind } from '../schema.ts';

export type FieldsProps = {
  choices: LinkChoices;
  values: Record<string, string>;
  errors: FieldErrors;
};

/** The fields of one kind of entry. */
export function EntryFields({ kind, ...props }: FieldsProps & { kind: EntryKind }) {
  switch (kind) {
    case 'reading':
      return <ReadingFields {...props} />;
    case 'method':
      return <MethodFields {...props} />;
    case 'finding':
      return <FindingFields {...props} />;
    case 'repair':
      return <RepairFields {...props} />;
    case 'proof':
      return <ProofFields {...props} />;
    case 'charge':
      return <ChargeFields {...props} />;
  }
}

function ReadingFields({ choices, values, errors }: FieldsProps) {
  const [kind, setKind] = useState(values.readingKind ?? values.kind ?? '');
  const quantity = choices.readingKinds.find(({ value }) => value === kind)?.quantity;
  const units =
    quantity === 'temperature'
      ? choices.temperatureUnits
      : quantity === 'pressure'
        ? choices.pressureUnits
        : [...choices.pressureUnits, ...choices.temperatureUnits];
  return (
    <>
      <SelectField
        name="readingKind"
        label="What was read"
        blank="Choose"
        options={choices.readingKinds}
        value={kind}
        onChange={setKind}
        error={errors.kind}
      />
      <MeasureField
        key={quantity}
        name="value"
        unitName="unit"
        label="Reading, as the gauge shows it"
        units={units}
        defaultValue={values.value}
        defaultUnit={values.unit}
        error={errors.value}
        unitError={errors.unit}
      />
      <TextField
        name="note"
        label="Note"
        optional
        defaultValue={values.note}
        error={errors.note}
        hint="Engine speed, door open, which gauge."
      />
      {choices.photos.length > 0 && (
        <SelectField
          name="photo"
          label="Photo of the gauge"
          blank="None"
          options={choices.photos}
          defaultValue={values.photo}
          error={errors.photo}
        />
      )}
    </>
  );
}

function MethodFields({ choices, values, errors }: FieldsProps) {
  return (
    <>
      <SelectField
        name="methodId"
        label="Method"
        blank="Choose"
        options={choices.methods}
        defaultValue={values.methodId}
        error={errors.methodId}
      />
      <RadioCards
        legend="What it showed"
        name="outcome"
        options={METHOD_OUTCOMES.filter((value) => value !== 'not-recorded').map((value) => ({
          value,
          label: METHOD_OUTCOME_NAMES[value],
        }))}
        defaultValue={values.outcome}
        error={errors.outcome}
      />
      <TextArea
        name="note"
        label="In words"
        optional
        rows={2}
        defaultValue={values.note}
        error={errors.note}
      />
    </>
  );
}

function FindingFields({ choices, values, errors }: FieldsProps) {
  return (
    <>
      <SelectField
        key={values.componentId}
        name="componentId"
        label="Part"
        blank="Choose"
        options={choices.components}
        defaultValue={values.componentId}
        error={errors.componentId}
      />
      <RadioCards
        legend="How sure"
        name="certainty"
        options={CERTAINTIES.map((value) => ({ value, label: CERTAINTY_NAMES[value] }))}
        defaultValue={values.certainty}
        error={errors.certainty}
      />
      <SelectField
        name="failureModeId"
        label="How it failed"
        blank="Not known yet"
        options={choices.failureModes}
        defaultValue={values.failureModeId}
        error={errors.failureModeId}
      />
      <TextField
        name="place"
        label="Where exactly"
        optional
        defaultValue={values.place}
        error={errors.place}
        hint="So that the next person puts a finger on it."
      />
      <SelectField
        name="causeId"
        label="Why it failed"
        blank="Not known yet"
        options={choices.causes}
        defaultValue={values.causeId}
        error={errors.causeId}
      />
      <SelectField
        name="mechanismId"
        label="By what wear"
        blank="Not known"
        options={choices.mechanisms}
        defaultValue={values.mechanismId}
        error={errors.mechanismId}
      />
      <TextArea name="why" label="In words" optional rows={3} defaultValue={values.why} error={errors.why} />
    </>
  );
}

function RepairFields({ choices, values, errors }: FieldsProps) {
  return (
    <>
      <SelectField
        name="actionId"
        label="What was done"
        blank="Choose"
        options={choices.actions}
        defaultValue={values.actionId}
        error={errors.actionId}
      />
      <SelectField
        name="componentId"
        label="On which part"
        blank="Not on one part"
        options={choices.components}
        defaultValue={values.componentId}
        error={errors.componentId}
      />
      <TextField
        name="partNumber"
        label="Part number"
        optional
        defaultValue={values.partNumber}
        error={errors.partNumber}
        autoCapitalize="characters"
      />
      <RadioCards
        legend="Because"
        name="because"
        options={[
          { value: 'failed', label: 'It had failed' },
          { value: 'opened', label: 'The circuit was open', hint: 'Renewed while at it' },
        ]}
        defaultValue={values.because ?? 'failed'}
        error={errors.because}
      />
      <TextArea
        name="note"
        label="In words"
        optional
        rows={2}
        defaultValue={values.note}
        error={errors.note}
      />
    </>
  );
}

function ProofFields({ choices, values, errors }: FieldsProps) {
  return (
    <>
      <TextField
        name="method"
        label="How it was tested"
        defaultValue={values.method}
        error={errors.method}
        hint="Vacuum hold, dry nitrogen, pump kit, at work under load."
      />
      <div className="grid gap-5 sm:grid-cols-2">
        <TextField
          name="minutes"
          label="For how many minutes"
          optional
          inputMode="decimal"
          defaultValue={values.minutes}
          error={errors.minutes}
        />
        <SelectField
          name="unit"
          label="Unit of the gauge"
          blank="No gauge"
          options={choices.pressureUnits}
          defaultValue={values.unit}
          error={errors.unit}
        />
        <TextField
          name="start"
          label="Gauge at the start"
          optional
          inputMode="decimal"
          defaultValue={values.start}
          error={errors.start}
        />
        <TextField
          name="end"
          label="Gauge at the end"
          optional
          inputMode="decimal"
          defaultValue={values.end}
          error={errors.end}
        />
      </div>
      <RadioCards
        legend="What it showed"
        name="verdict"
        options={PROOF_VERDICTS.map((value) => ({ value, label: PROOF_VERDICT_NAMES[value] }))}
        defaultValue={values.verdict}
        error={errors.verdict}
      />
      <TextArea
        name="note"
        label="In words"
        optional
        rows={2}
        defaultValue={values.note}
        error={errors.note}
      />
    </>
  );
}

function ChargeFields({ choices, values, errors }: FieldsProps) {
  return (
    <>
      <RadioCards
        legend="What was done"
        name="chargeKind"
        options={CHARGE_KINDS.map((value) => ({ value, label: CHARGE_KIND_NAMES[value] }))}
        defaultValue={values.chargeKind ?? values.kind}
        error={errors.kind}
      />
      <MeasureField
        name="value"
        unitName="unit"
        label="How much"
        units={choices.amountUnits}
        defaultValue={values.value}
        defaultUnit={values.unit}
        error={errors.value}
        unitError={errors.unit}
      />
      <TextField
        name="substance"
        label="Of what"
        optional
        defaultValue={values.substance}
        error={errors.substance}
        hint="Refrigerant, oil or fluid, as the container says."
      />
      {choices.cylinders.length > 0 && (
        <SelectField
          name="cylinder"
          label="From or into which cylinder or can"
          hint="Then it enters the refrigerant book by itself."
          blank="None of the book"
          options={choices.cylinders}
          defaultValue={values.cylinder}
          error={errors.cylinder}
        />
      )}
      <TextField
        name="source"
        label={choices.cylinders.length > 0 ? 'Another container' : 'From or into which container'}
        optional
        defaultValue={values.source}
        error={errors.source}
      />
      <TextArea
        name="note"
        label="In words"
        optional
        rows={2}
        defaultValue={values.note}
        error={errors.note}
      />
    </>
  );
}
