import { Form, useNavigation } from 'react-router';
import { TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { type Refusal, versionToSend } from '#app/features/outcome.ts';

type Props = {
  values: Record<string, string | number | null>;
  version?: number;
  refusal: Refusal | undefined;
  kinds: string[];
  yards: string[];
  save: string;
};

export function MachineForm({ values, version, refusal, kinds, yards, save }: Props) {
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
        <TextField
          {...field('number')}
          label="Own number"
          hint="As painted on it."
          autoCapitalize="characters"
          required
        />
        <TextField {...field('kind')} label="Kind" hint="Wheel loader, excavator …" list="kinds" />
        <TextField {...field('make')} label="Make" />
        <TextField {...field('model')} label="Model" />
        <TextField {...field('serial')} label="Serial number" optional />
        <TextField {...field('year')} label="Year" optional inputMode="numeric" />
        <TextField {...field('hours')} label="Hours" optional inputMode="numeric" />
        <TextField {...field('yard')} label="Yard" list="yards" hint="A new name makes a new yard." />
      </div>
      <TextArea {...field('notes')} label="Notes" optional />
      <datalist id="kinds">
        {kinds.map((kind) => (
          <option key={kind} value={kind} />
        ))}
      </datalist>
      <datalist id="yards">
        {yards.map((yard) => (
          <option key={yard} value={yard} />
        ))}
      </datalist>
      <Button pending={pending}>{save}</Button>
    </Form>
  );
}
