import { Form, useNavigation } from 'react-router';
import { TextArea } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { versionToSend } from '#app/features/outcome.ts';
import type { LinkActionData } from '../link-action.server.ts';
import { RefusalNotice } from './refusal-notice.tsx';

type Props = {
  label: string;
  note: string;
  version: number;
  mayEdit: boolean;
  actionData: LinkActionData | undefined;
};

/** The free words of a link. */
export function NotesForm({ label, note, version, mayEdit, actionData }: Props) {
  const mine = actionData?.form === 'notes' ? actionData : undefined;
  const pending = useNavigation().formData?.get('intent') === 'notes';
  if (!mayEdit)
    return note ? (
      <p className="max-w-prose break-words whitespace-pre-line">{note}</p>
    ) : (
      <p className="text-muted">No notes.</p>
    );
  return (
    <Form method="post" className="space-y-3" noValidate>
      <input type="hidden" name="version" value={versionToSend(mine?.refusal, version)} />
      <RefusalNotice refusal={mine?.refusal} />
      <TextArea
        key={mine ? 'typed' : note}
        name="note"
        label={label}
        rows={5}
        defaultValue={mine?.typed.note ?? note}
        maxLength={20_000}
      />
      <Button name="intent" value="notes" variant="secondary" pending={pending}>
        Save notes
      </Button>
    </Form>
  );
}
