import { useSearchParams } from 'react-router';
import { CircuitDrawing } from '#app/components/drawing/circuit-drawing.tsx';
import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { Cautions } from '#app/components/ui/notice.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { REFRIGERANT_SPOTS } from '#app/domain/drawing/refrigerant-circuit.ts';
import { AddEntry, EntryList } from '#app/features/cases/components/entries.tsx';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { NotesForm } from '#app/features/cases/components/notes-form.tsx';
import { editedEntry } from '#app/features/cases/edited-entry.ts';
import { linkAction, linkLoader } from '#app/features/cases/link-page.server.ts';
import type { Route } from './+types/trace.ts';

export const loader = (args: Route.LoaderArgs) => linkLoader(args, 'trace');
export const action = (args: Route.ActionArgs) => linkAction(args, 'trace');

export default function Trace({ loaderData, actionData }: Route.ComponentProps) {
  const { links, choices, mayEdit, photos, number, medium, cautions } = loaderData;
  const [params] = useSearchParams();
  const shared = { choices, version: links.versions.trace ?? 1, actionData };
  const names = Object.fromEntries(choices.components.map(({ value, label }) => [value, label]));
  const part = names[params.get('part') ?? ''] ? (params.get('part') ?? '') : '';
  const found = links.findings
    .filter(({ certainty }) => certainty !== 'ruled-out')
    .map(({ componentId }) => componentId);
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Cautions cautions={cautions} />
      <Panel title="Methods" lead="What was tried and what each showed, also what showed nothing.">
        <EntryList
          kind="method"
          entries={links.methods}
          editing={editedEntry(params, 'method')}
          mayEdit={mayEdit}
          empty="No method tried yet."
          {...shared}
        />
        {mayEdit && <AddEntry kind="method" title="Add a method" count={links.methods.length} {...shared} />}
      </Panel>
      <Panel
        title="Findings"
        id="findings"
        lead={
          medium === 'refrigerant'
            ? 'Tap the part on the drawing, or choose it in the form.'
            : 'The part, how it failed, why, and where exactly.'
        }
      >
        {medium === 'refrigerant' && (
          <div className="mb-5">
            <CircuitDrawing
              names={names}
              found={found}
              selected={part}
              linkFor={mayEdit ? (id) => `?part=${id}#findings-form` : undefined}
            />
          </div>
        )}
        <EntryList
          kind="finding"
          entries={links.findings}
          editing={editedEntry(params, 'finding')}
          mayEdit={mayEdit}
          empty="No finding yet."
          {...shared}
        />
        {mayEdit && (
          <div id="findings-form" className="scroll-mt-4">
            <AddEntry
              kind="finding"
              title={part ? `Add a finding: ${names[part]}` : 'Add a finding'}
              start={part ? { componentId: part } : {}}
              open={part !== ''}
              count={links.findings.length + REFRIGERANT_SPOTS.findIndex(({ id }) => id === part)}
              {...shared}
            />
          </div>
        )}
      </Panel>
      <PhotoSection
        title="Photos of the spot"
        caseNumber={number}
        link="trace"
        photoRole="uv"
        photos={photos}
      />
      <Panel title="In words">
        <NotesForm
          label="Notes on the trace"
          note={links.notes.trace}
          version={shared.version}
          mayEdit={mayEdit}
          actionData={actionData}
        />
      </Panel>
    </LinkFrame>
  );
}
