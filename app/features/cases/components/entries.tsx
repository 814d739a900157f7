import { Pencil } from 'lucide-react';
import { Form, Link, useNavigation } from 'react-router';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { versionToSend } from '#app/features/outcome.ts';
import type { PhotoView } from '#app/features/photos/views.ts';
import type { LinkChoices } from '../choices.ts';
import type { LinkActionData } from '../link-action.server.ts';
import type { EntryView } from '../link-views.server.ts';
import type { EntryKind } from '../schema.ts';
import { EntryFields } from './entry-fields.tsx';
import { OverrideField } from './override-field.tsx';
import { RefusalNotice } from './refusal-notice.tsx';

type Shared = {
  kind: EntryKind;
  choices: LinkChoices;
  version: number;
  actionData: LinkActionData | undefined;
  mayOverride?: boolean;
};

type ListProps = Shared & {
  entries: EntryView[];
  editing: number | null;
  mayEdit: boolean;
  empty: string;
  /** Among them the photos that entries show, such as a reading’s gauge. */
  photos?: readonly PhotoView[];
};

/** The entries of one kind, each with its own way to be changed or removed. */
export function EntryList({ entries, editing, mayEdit, empty, photos = [], ...shared }: ListProps) {
  if (entries.length === 0) return <p className="text-muted">{empty}</p>;
  return (
    <ul className="space-y-4">
      {entries.map((entry) => (
        <li
          key={entry.id}
          id={`entry-${entry.kind}-${entry.id}`}
          className="border-l-4 border-line pl-4 data-[tone=danger]:border-danger data-[tone=evidence]:border-glow"
          data-tone={entry.tone}
        >
          {editing === entry.id && mayEdit ? (
            <ChangeEntry entry={entry} {...shared} />
          ) : (
            <ShownEntry
              entry={entry}
              photo={photos.find(({ id }) => id === entry.photoId)}
              mayEdit={mayEdit}
            />
          )}
        </li>
      ))}
    </ul>
  );
}

type ShownProps = { entry: EntryView; photo: PhotoView | undefined; mayEdit: boolean };

function ShownEntry({ entry, photo, mayEdit }: ShownProps) {
  return (
    <div className="flex items-start gap-3">
      {photo && (
        <a href={photo.medium} className="shrink-0">
          <img
            src={photo.thumb}
            alt={photo.caption || `The gauge at ${entry.headline}`}
            width={photo.width}
            height={photo.height}
            loading="lazy"
            className="size-20 rounded-lg border border-line object-cover"
          />
        </a>
      )}
      <div className="min-w-0 flex-1">
        <p className="figures text-lg font-semibold break-words">{entry.headline}</p>
        {entry.lines.map((line) => (
          <p key={line} className="break-words">
            {line}
          </p>
        ))}
        {entry.note && <p className="max-w-prose break-words whitespace-pre-line">{entry.note}</p>}
        <p className="text-sm text-muted">
          {entry.byName && `${entry.byName}, `}
          <DateTime value={entry.at} />
        </p>
      </div>
      {mayEdit && (
        <Link
          to={`?edit=${entry.kind}-${entry.id}#entry-${entry.kind}-${entry.id}`}
          preventScrollReset
          className="tap grid shrink-0 place-items-center rounded-lg text-action hover:bg-action-soft print:hidden"
          aria-label={`Change: ${entry.headline}`}
        >
          <Pencil className="size-5" aria-hidden />
        </Link>
      )}
    </div>
  );
}

function ChangeEntry({
  mayOverride = false,
  entry,
  kind,
  choices,
  version,
  actionData,
}: Shared & { entry: EntryView }) {
  const mine = actionData?.form === `change-${entry.id}` ? actionData : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  const pending = usePendingIntent();
  return (
    <Form method="post" className="space-y-5 rounded-xl bg-raised p-4" noValidate>
      <input type="hidden" name="kind" value={kind} />
      <input type="hidden" name="entryId" value={entry.id} />
      <input type="hidden" name="version" value={versionToSend(mine?.refusal, version)} />
      <RefusalNotice refusal={mine?.refusal} />
      <OverrideField refusal={mine?.refusal} mayOverride={mayOverride} />
      <EntryFields kind={kind} choices={choices} values={mine?.typed ?? entry.values} errors={errors} />
      <div className="flex flex-wrap gap-2">
        <Button name="intent" value="change" pending={pending === 'change'}>
          Save
        </Button>
        <ButtonLink to="?" preventScrollReset variant="quiet">
          Leave as it was
        </ButtonLink>
        <Button name="intent" value="remove" variant="danger" pending={pending === 'remove'}>
          Remove
        </Button>
      </div>
    </Form>
  );
}

type AddProps = Shared & { title: string; start?: Record<string, string>; open?: boolean; count: number };

/** The form for one more entry; it empties itself once the entry is added. */
export function AddEntry({
  mayOverride = false,
  kind,
  choices,
  version,
  actionData,
  title,
  start = {},
  open = false,
  count,
}: AddProps) {
  const mine = actionData?.form === `add-${kind}` ? actionData : undefined;
  const errors = mine?.refusal.refused === 'fields' ? mine.refusal.fields : {};
  const pending = usePendingIntent();
  return (
    <details
      key={`${kind}-${count}-${open}`}
      open={open || mine !== undefined}
      className="mt-5 rounded-xl border border-line bg-surface print:hidden"
    >
      <summary className="tap flex items-center px-4 py-2 font-semibold text-action">{title}</summary>
      <Form method="post" className="space-y-5 px-4 pb-4" noValidate>
        <input type="hidden" name="kind" value={kind} />
        <input type="hidden" name="version" value={version} />
        <RefusalNotice refusal={mine?.refusal} />
        <OverrideField refusal={mine?.refusal} mayOverride={mayOverride} />
        <EntryFields kind={kind} choices={choices} values={mine?.typed ?? start} errors={errors} />
        <Button name="intent" value="add" pending={pending === 'add'}>
          Add
        </Button>
      </Form>
    </details>
  );
}

function usePendingIntent(): string | null {
  const { formData } = useNavigation();
  const intent = formData?.get('intent');
  return typeof intent === 'string' ? intent : null;
}
