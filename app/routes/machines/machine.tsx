import { Link } from 'react-router';
import { PhotoStrip } from '#app/components/photos/photo-strip.tsx';
import { CaseStateBadge } from '#app/components/ui/badge.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { Day } from '#app/components/ui/time.tsx';
import type { LeakEstimate } from '#app/domain/leak-rate/leak-history.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { loadMachine } from '#app/features/machines/queries.server.ts';
import { listCircuitPhotos } from '#app/features/photos/queries.server.ts';
import { ToppedUp } from '#app/features/refrigerant-book/components/topped-up.tsx';
import { loadLeakEstimates } from '#app/features/refrigerant-book/leak-estimates.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/machine.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.machine.number ?? 'Machine'} · Weepmark` },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const machine = await orRefuse(loadMachine(viewer, wholeParam(params.id)));
  const photos = await Promise.all(machine.circuits.map(({ id }) => listCircuitPhotos(viewer, id)));
  return {
    machine: {
      ...machine,
      circuits: machine.circuits.map((circuit, place) => ({
        ...circuit,
        photos: photos[place]?.photos ?? [],
      })),
    },
    leaks: await loadLeakEstimates({ machineId: machine.id }, new Date()),
    mayEdit: may(viewer.role, 'machine:edit'),
    mayOpen: may(viewer.role, 'case:open'),
  };
}

export default function Machine({ loaderData: { machine, leaks, mayEdit, mayOpen } }: Route.ComponentProps) {
  return (
    <div className="space-y-8">
      <PageHeader
        eyebrow={machine.kind}
        title={`${machine.number} ${machine.make} ${machine.model}`}
        actions={
          <>
            {mayEdit && <ButtonLink to="edit">Change</ButtonLink>}
            {mayOpen && (
              <ButtonLink to={`/cases/new?machine=${encodeURIComponent(machine.number)}`} variant="primary">
                Open a case
              </ButtonLink>
            )}
          </>
        }
      />
      <Facts
        columns={3}
        facts={[
          { label: 'Yard', value: machine.yardName },
          { label: 'Hours', value: machine.hours?.toLocaleString('en-GB') },
          { label: 'Year', value: machine.year },
          { label: 'Serial number', value: machine.serial },
          { label: 'Notes', value: machine.notes },
        ]}
      />
      <Panel
        title="Circuits"
        actions={
          mayEdit && (
            <ButtonLink to="circuits/new" variant="quiet">
              Add a circuit
            </ButtonLink>
          )
        }
      >
        {machine.circuits.length === 0 && (
          <EmptyState title="No circuit yet">Add the circuits that leak cases can be about.</EmptyState>
        )}
        <ul className="space-y-6">
          {machine.circuits.map((circuit) => (
            <li key={circuit.id} className="space-y-3">
              <h3 className="flex flex-wrap items-baseline gap-x-3 font-semibold">
                {circuit.name}
                <span className="font-normal text-muted">{circuit.mediumName}</span>
                {mayEdit && (
                  <Link
                    to={`circuits/${circuit.id}`}
                    className="link inline-flex min-h-11 items-center font-normal"
                    aria-label={`Change ${circuit.name}`}
                  >
                    Change
                  </Link>
                )}
              </h3>
              <Facts
                columns={3}
                facts={[
                  { label: 'Refrigerant', value: circuit.refrigerant },
                  { label: 'Plate charge or fill', value: circuit.plateCharge },
                  { label: 'Oil or fluid', value: circuit.oil },
                  { label: 'Metering', value: circuit.metering },
                  { label: 'Service ports', value: circuit.portsText },
                ]}
              />
              <PhotoStrip photos={circuit.photos} />
            </li>
          ))}
        </ul>
      </Panel>
      {leaks.length > 0 && (
        <Panel
          title="What had to be added"
          lead="From the refrigerant book. Per cent a year by the methods of 40 CFR 82.152, which cab circuits do not fall under; local law comes first."
        >
          <ul className="space-y-6">
            {leaks.map((leak) => (
              <li key={leak.circuitId} className="space-y-4">
                <h3 className="font-semibold">{leak.circuitName}</h3>
                <ToppedUp toppedUp={leak.toppedUp} />
                <Facts columns={3} facts={leakFacts(leak)} />
              </li>
            ))}
          </ul>
        </Panel>
      )}
      <Panel title="Cases on this machine">
        {machine.cases.length === 0 ? (
          <EmptyState title="No case yet">Nothing has leaked here, as far as this shop knows.</EmptyState>
        ) : (
          <ul className="divide-y divide-line">
            {machine.cases.map((row) => (
              <li
                key={row.number}
                className="flex flex-wrap items-center justify-between gap-x-4 gap-y-1 py-3"
              >
                <Link to={`/cases/${row.number}`} className="link min-w-0 break-words">
                  {row.number} {row.title}
                </Link>
                <span className="flex items-center gap-3">
                  <CaseStateBadge state={row.state} />
                  <span className="text-muted">
                    <Day value={row.openedAt} />
                  </span>
                </span>
              </li>
            ))}
          </ul>
        )}
      </Panel>
    </div>
  );
}

function leakFacts({ gramsPerYear, annualizing, rolling }: LeakEstimate) {
  const percent = (rate: number | null) => (rate === null ? '' : `${rate.toFixed(1)} % a year`);
  return [
    {
      label: 'Lost, by the newest addition',
      value:
        gramsPerYear === null ? '' : `about ${Math.round(gramsPerYear).toLocaleString('en-GB')} g a year`,
    },
    { label: 'Annualizing method', value: percent(annualizing) },
    { label: 'Rolling average', value: percent(rolling) },
  ];
}
