import { Form } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { BookInput } from '../schema.ts';

type Props = { input: BookInput; people: { id: number; name: string }[] };

/** A period, a machine or a person, kept in the address. */
export function DateFilter({ input, people }: Props) {
  return (
    <Form
      className="mb-5 grid items-end gap-4 sm:grid-cols-[1fr_1fr_1fr_1fr_auto] print:hidden"
      key={JSON.stringify(input)}
    >
      <TextField name="from" label="From" type="date" defaultValue={input.from} />
      <TextField name="to" label="To" type="date" defaultValue={input.to} />
      <TextField name="machine" label="Machine" defaultValue={input.machine} />
      <SelectField
        name="person"
        label="Person"
        blank="Everyone"
        options={people.map(({ id, name }) => ({ value: String(id), label: name }))}
        defaultValue={input.person ? String(input.person) : ''}
      />
      <Button variant="secondary">Show</Button>
    </Form>
  );
}
