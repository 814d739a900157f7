import { useSearchParams } from 'react-router';
import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { AddEntry, EntryList } from '#app/features/cases/components/entries.tsx';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { NotesForm } from '#app/features/cases/components/notes-form.tsx';
import { SpokenReadings } from '#app/features/cases/components/spoken-readings.tsx';
import { editedEntry } from '#app/features/cases/edited-entry.ts';
import { linkAction, linkLoader } from '#app/features/cases/link-page.server.ts';
import type { Route } from './+types/readings.ts';

export const loader = (args: Route.LoaderArgs) => linkLoader(args, 'readings');
export const action = (args: Route.ActionArgs) => linkAction(args, 'readings');

export default function Readings({ loaderData, actionData }: Route.ComponentProps) {
  const { links, choices, mayEdit, photos, number } = loaderData;
  const editing = editedEntry(useSearchParams()[0], 'reading');
  const shared = { choices, version: links.versions.readings ?? 1, actionData };
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Panel
        title="Readings"
        lead="Pressures standing and running, temperatures, in the unit that the gauge shows."
      >
        <EntryList
          kind="reading"
          entries={links.readings}
          editing={editing}
          mayEdit={mayEdit}
          empty="No reading yet."
          photos={photos.photos}
          {...shared}
        />
        {mayEdit && (
          <AddEntry
            kind="reading"
            title="Add a reading"
            count={links.readings.length}
            open={links.readings.length === 0}
            {...shared}
          />
        )}
      </Panel>
      <SpokenReadings spoken={loaderData.spoken} unit={loaderData.units.pressure} />
      <Panel title="In words">
        <NotesForm
          label="Notes on the readings"
          note={links.notes.readings}
          version={shared.version}
          mayEdit={mayEdit}
          actionData={actionData}
        />
      </Panel>
      <PhotoSection
        title="Gauge photos"
        caseNumber={number}
        link="readings"
        photoRole="gauge"
        photos={photos}
      />
    </LinkFrame>
  );
}
