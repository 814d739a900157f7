import { Link, useSearchParams } from 'react-router';
import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { Cautions, Notice } from '#app/components/ui/notice.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { fromSi, UNITS } from '#app/domain/units/units.ts';
import { BackToWork } from '#app/features/cases/components/back-to-work.tsx';
import { AddEntry, EntryList } from '#app/features/cases/components/entries.tsx';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { NotesForm } from '#app/features/cases/components/notes-form.tsx';
import { editedEntry } from '#app/features/cases/edited-entry.ts';
import { linkAction, linkLoader } from '#app/features/cases/link-page.server.ts';
import type { Route } from './+types/charge.ts';

export const loader = (args: Route.LoaderArgs) => linkLoader(args, 'charge');
export const action = (args: Route.ActionArgs) => linkAction(args, 'charge');

export default function Charge({ loaderData, actionData }: Route.ComponentProps) {
  const { links, choices, mayEdit, photos, number, cautions, weights, units, spoken } = loaderData;
  const inMass = (grams: number | null) =>
    grams === null
      ? ''
      : `${Number(fromSi(grams / 1000, units.mass).toPrecision(4))} ${UNITS[units.mass].label}`;
  const windowAddress = `/reference/charge?${new URLSearchParams({
    ...(spoken.refrigerant ? { refrigerant: spoken.refrigerant } : {}),
    ...(spoken.ambientC === null ? {} : { ambient: spoken.ambientC.toFixed(0), ambientUnit: 'C' }),
  })}`;
  const editing = editedEntry(useSearchParams()[0], 'charge');
  const shared = {
    choices,
    version: links.versions.charge ?? 1,
    actionData,
    mayOverride: loaderData.mayOverride,
  };
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Cautions cautions={cautions} />
      <Facts
        columns={3}
        facts={[
          {
            label: 'Plate says',
            value: [links.plate.refrigerant, links.plate.charge].filter(Boolean).join(', '),
          },
          { label: 'Oil', value: links.plate.oil },
          { label: 'Service ports', value: links.plate.ports },
        ]}
      />
      {weights && (
        <Facts
          columns={3}
          facts={[
            { label: 'Taken out last', value: inMass(weights.recoveredGrams) },
            { label: 'Put in since', value: inMass(weights.chargedGrams) },
            {
              label: 'Still to go in by the plate',
              value:
                weights.toGoGrams !== null && weights.toGoGrams < 0
                  ? `nothing: ${inMass(-weights.toGoGrams)} over`
                  : inMass(weights.toGoGrams),
            },
          ]}
        />
      )}
      {weights && (
        <p className="max-w-prose text-sm text-muted">
          By weight is the only sure way. What stays in the hoses is not in the circuit: purge them, and weigh
          with them full. Add the oil that went with what came out and with each part renewed, as the maker
          says (common practice, no source). By pressure only as a check:{' '}
          <Link to={windowAddress} className="link">
            the day’s window
          </Link>
          .
        </p>
      )}
      {!links.provedTight && (
        <Notice tone="warn" title="Not proved tight">
          <p>
            The newest proof is missing, older than the newest repair, or not tight. Prove the circuit tight
            before any fluid goes back.
          </p>
        </Notice>
      )}
      {loaderData.remainderUnknown && (
        <Notice tone="warn" title="The remainder is unknown">
          <p>
            Nothing on record says what is still inside. Recover and weigh it first, so that what goes in can
            be charged by weight.
          </p>
        </Notice>
      )}
      <Panel
        title="Charge"
        lead="What came out and what went in, from which cylinder or can, against what the plate says."
      >
        <EntryList
          kind="charge"
          entries={links.charges}
          editing={editing}
          mayEdit={mayEdit}
          empty="Nothing recorded yet."
          {...shared}
        />
        {mayEdit && (
          <AddEntry
            kind="charge"
            title="Add what went in or came out"
            count={links.charges.length}
            open={links.charges.length === 0}
            {...shared}
          />
        )}
      </Panel>
      <Panel title="In words">
        <NotesForm
          label="Notes on the charge"
          note={links.notes.charge}
          version={shared.version}
          mayEdit={mayEdit}
          actionData={actionData}
        />
      </Panel>
      <PhotoSection
        title="Photos of gauges and scales"
        caseNumber={number}
        link="charge"
        photoRole="gauge"
        photos={photos}
      />
      <BackToWork
        number={number}
        backToWorkAt={loaderData.backToWorkAt}
        provedTight={links.provedTight}
        mayEdit={mayEdit}
      />
    </LinkFrame>
  );
}
