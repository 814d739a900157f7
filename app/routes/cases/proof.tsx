import { useSearchParams } from 'react-router';
import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { Cautions } from '#app/components/ui/notice.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { fromSi } from '#app/domain/units/units.ts';
import { AddEntry, EntryList } from '#app/features/cases/components/entries.tsx';
import { HoldTestForm } from '#app/features/cases/components/hold-test-form.tsx';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { NotesForm } from '#app/features/cases/components/notes-form.tsx';
import { PressureTestForm } from '#app/features/cases/components/pressure-test-form.tsx';
import { editedEntry } from '#app/features/cases/edited-entry.ts';
import { linkAction, linkLoader } from '#app/features/cases/link-page.server.ts';
import { HoldResult } from '#app/features/reference/components/hold-result.tsx';
import type { Route } from './+types/proof.ts';

export const loader = (args: Route.LoaderArgs) => linkLoader(args, 'proof');
export const action = (args: Route.ActionArgs) => linkAction(args, 'proof');

export default function Proof({ loaderData, actionData }: Route.ComponentProps) {
  const { links, choices, mayEdit, photos, number, cautions, medium, holdTests, spoken } = loaderData;
  const editing = editedEntry(useSearchParams()[0], 'proof');
  const { ambientC } = spoken;
  const ambient = ambientC === null ? '' : fromSi(ambientC + 273.15, loaderData.units.temperature).toFixed(0);
  const shared = { choices, version: links.versions.proof ?? 1, actionData };
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Cautions cautions={cautions} />
      {loaderData.usualProofs.length > 0 && (
        <details>
          <summary className="tap flex items-center font-semibold text-action">
            What usually proves this medium (common practice, no source)
          </summary>
          <ul className="list-disc space-y-1 pl-6">
            {loaderData.usualProofs.map((proof) => (
              <li key={proof}>{proof}</li>
            ))}
          </ul>
        </details>
      )}
      <Panel title="Proof" lead="The test that shows the circuit tight, before any fluid goes back.">
        <EntryList
          kind="proof"
          entries={links.proofs}
          editing={editing}
          mayEdit={mayEdit}
          empty="No test yet."
          {...shared}
        />
        {mayEdit && (
          <AddEntry
            kind="proof"
            title="Add a test"
            count={links.proofs.length}
            open={links.proofs.length === 0}
            {...shared}
          />
        )}
        {mayEdit && loaderData.pressureTest && (
          <PressureTestForm
            kind={loaderData.pressureTest}
            actionData={actionData}
            count={links.proofs.length}
            ambient={ambient}
            units={loaderData.units}
          />
        )}
      </Panel>
      {medium === 'refrigerant' && (
        <Panel
          title="Vacuum holds"
          lead="By their readings, with the smallest leak that each could have seen."
        >
          {holdTests.length === 0 && <p className="text-muted">None yet.</p>}
          <ul className="space-y-8">
            {holdTests.map(({ id, ...shown }) => (
              <li key={id}>
                <HoldResult {...shown} />
              </li>
            ))}
          </ul>
          {mayEdit && (
            <HoldTestForm
              key={holdTests.length}
              number={number}
              actionData={actionData}
              count={holdTests.length}
              mayOverride={loaderData.mayOverride}
              start={{
                ambient,
                altitude: String(spoken.altitudeM),
                volume: loaderData.volume,
                temperatureUnits: choices.temperatureUnits,
              }}
            />
          )}
        </Panel>
      )}
      <Panel title="In words">
        <NotesForm
          label="Notes on the proof"
          note={links.notes.proof}
          version={shared.version}
          mayEdit={mayEdit}
          actionData={actionData}
        />
      </Panel>
      <PhotoSection
        title="Gauge photos of the test"
        caseNumber={number}
        link="proof"
        photoRole="gauge"
        photos={photos}
      />
    </LinkFrame>
  );
}
