import { useState } from 'react';
import { Form, useNavigation } from 'react-router';
import { MeasureField, type Option, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Cautions } from '#app/components/ui/notice.tsx';
import {
  MOVEMENT_KIND_NAMES,
  MOVEMENT_KINDS,
  type MovementKind,
  NEEDS_MACHINE,
} from '#app/domain/refrigerant-book/book.ts';
import { cautionsFor } from '#app/domain/vocabulary/vocabulary.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldsOf, type SentForm } from './sent-form.ts';

type Props = {
  cylinders: { id: number; label: string; refrigerant: string; grams: number }[];
  units: Option[];
  certificate: string;
  sent: SentForm;
};

/** A movement of the book. Before scripts run every field shows; then only those that the kind needs. */
export function MovementForm({ cylinders, units, certificate, sent }: Props) {
  const pending = useNavigation().formData?.get('intent') === 'movement';
  const { typed, wrong } = fieldsOf(sent);
  const [kind, setKind] = useState(typed.kind ?? 'bought');
  const known = MOVEMENT_KINDS.find((name): name is MovementKind => name === kind) ?? 'bought';
  return (
    <>
      <Cautions cautions={cautionsFor('charge', 'refrigerant')} />
      <Form method="post" className="mt-4 max-w-3xl space-y-5" noValidate>
        <RefusalNotice refusal={sent?.refusal} />
        <div className="grid gap-5 sm:grid-cols-2">
          <SelectField
            name="kind"
            label="What happened"
            options={MOVEMENT_KINDS.map((value) => ({ value, label: MOVEMENT_KIND_NAMES[value] }))}
            value={kind}
            onChange={setKind}
            error={wrong.kind}
          />
          <SelectField
            name="cylinder"
            label="Cylinder or can"
            blank="Choose"
            options={cylinders.map(({ id, label, refrigerant, grams }) => ({
              value: String(id),
              label: `${label}, ${refrigerant}, ${grams.toLocaleString('en-GB')} g`,
            }))}
            defaultValue={typed.cylinder}
            error={wrong.cylinder}
          />
          <MeasureField
            name="amount"
            unitName="unit"
            label={known === 'weighed' ? 'Net weight on the scale' : 'Weight'}
            hint={HINTS[known]}
            units={units}
            defaultValue={typed.amount}
            defaultUnit={typed.unit}
            error={wrong.amount}
            unitError={wrong.unit}
          />
          <div className={NEEDS_MACHINE[known] ? 'contents' : 'hidden noscript:contents'}>
            <TextField
              name="machine"
              label="Machine"
              hint="Its number, for what was charged or recovered."
              defaultValue={typed.machine}
              error={wrong.machine}
              autoComplete="off"
            />
            <TextField
              name="circuit"
              label="Circuit"
              hint="Its name, where the machine has several."
              defaultValue={typed.circuit}
              error={wrong.circuit}
              autoComplete="off"
            />
          </div>
          <TextField
            name="certificate"
            label="Certificate of who did it"
            optional
            defaultValue={typed.certificate ?? certificate}
            error={wrong.certificate}
          />
        </div>
        <TextArea name="note" label="Note" optional rows={2} defaultValue={typed.note} error={wrong.note} />
        <Button name="intent" value="movement" pending={pending}>
          Enter it
        </Button>
      </Form>
    </>
  );
}

const HINTS: Partial<Record<MovementKind, string>> = {
  weighed: 'Tare taken off. The difference from the book is entered as missing or found.',
  opened: 'Not needed for an opening.',
};
