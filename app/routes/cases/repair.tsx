import { useSearchParams } from 'react-router';
import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { Cautions } from '#app/components/ui/notice.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { AddEntry, EntryList } from '#app/features/cases/components/entries.tsx';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { NotesForm } from '#app/features/cases/components/notes-form.tsx';
import { editedEntry } from '#app/features/cases/edited-entry.ts';
import { linkAction, linkLoader } from '#app/features/cases/link-page.server.ts';
import type { Route } from './+types/repair.ts';

export const loader = (args: Route.LoaderArgs) => linkLoader(args, 'repair');
export const action = (args: Route.ActionArgs) => linkAction(args, 'repair');

export default function Repair({ loaderData, actionData }: Route.ComponentProps) {
  const { links, choices, mayEdit, photos, number, cautions } = loaderData;
  const editing = editedEntry(useSearchParams()[0], 'repair');
  const shared = { choices, version: links.versions.repair ?? 1, actionData };
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Cautions cautions={cautions} />
      <Panel
        title="Repair"
        lead="What was replaced or re-made, with part numbers, and what else was renewed because the circuit was open."
      >
        <EntryList
          kind="repair"
          entries={links.repairs}
          editing={editing}
          mayEdit={mayEdit}
          empty="Nothing done yet."
          {...shared}
        />
        {mayEdit && (
          <AddEntry
            kind="repair"
            title="Add what was done"
            count={links.repairs.length}
            open={links.repairs.length === 0}
            {...shared}
          />
        )}
      </Panel>
      <Panel title="In words">
        <NotesForm
          label="Notes on the repair"
          note={links.notes.repair}
          version={shared.version}
          mayEdit={mayEdit}
          actionData={actionData}
        />
      </Panel>
      <PhotoSection
        title="Photos of the part and the repair"
        caseNumber={number}
        link="repair"
        photoRole="part"
        photos={photos}
      />
    </LinkFrame>
  );
}
