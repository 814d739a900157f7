import { Form, useNavigation } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { REFRIGERANTS } from '#app/domain/refrigerant/saturation.ts';
import { CYLINDER_KIND_NAMES, CYLINDER_KINDS } from '#app/domain/refrigerant-book/book.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldsOf, type SentForm } from './sent-form.ts';

export function CylinderForm({ count, sent }: { count: number; sent: SentForm }) {
  const pending = useNavigation().formData?.get('intent') === 'cylinder';
  const { typed, wrong } = fieldsOf(sent);
  return (
    <details
      className="mt-4 rounded-xl border border-line bg-surface print:hidden"
      open={sent !== undefined}
      key={count}
    >
      <summary className="tap flex items-center px-4 py-2 font-semibold text-action">
        Add a cylinder or can
      </summary>
      <Form method="post" className="grid gap-5 px-4 pb-4 sm:grid-cols-3" noValidate>
        <div className="sm:col-span-3">
          <RefusalNotice refusal={sent?.refusal} />
        </div>
        <TextField name="label" label="Number on it" defaultValue={typed.label} error={wrong.label} />
        <SelectField
          name="refrigerant"
          label="Refrigerant"
          options={REFRIGERANTS.map((value) => ({ value, label: value }))}
          defaultValue={typed.refrigerant}
          error={wrong.refrigerant}
        />
        <SelectField
          name="kind"
          label="It is"
          options={CYLINDER_KINDS.map((value) => ({ value, label: CYLINDER_KIND_NAMES[value] }))}
          defaultValue={typed.kind}
          error={wrong.kind}
        />
        <Button name="intent" value="cylinder" pending={pending}>
          Add
        </Button>
      </Form>
    </details>
  );
}
