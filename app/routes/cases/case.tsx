import { Link, Outlet, useLocation } from 'react-router';
import { ChainStrip } from '#app/components/chain/chain-strip.tsx';
import { CaseStateBadge } from '#app/components/ui/badge.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { LINK_KEYS } from '#app/domain/chain/chain.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/case.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  {
    title: loaderData
      ? `Case ${loaderData.head.number}: ${loaderData.head.title} · Weepmark`
      : 'Case · Weepmark',
  },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  return { head: await orRefuse(loadCaseHead(viewer, wholeParam(params.number))) };
}

export default function CaseLayout({ loaderData: { head } }: Route.ComponentProps) {
  const last = useLocation().pathname.split('/').at(-1);
  const current = LINK_KEYS.find((key) => key === last);
  const { machine, circuit } = head;
  return (
    <article>
      <header className="mb-4">
        <p className="eyebrow mb-1">
          <Link to={`/cases/${head.number}`} className="link">
            Case {head.number}
          </Link>
          {head.externalId && ` · ${head.externalId}`} · {head.mediumName}
        </p>
        <h1 className="text-2xl font-semibold break-words sm:text-3xl">{head.title}</h1>
        <div className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-1">
          <CaseStateBadge state={head.state} />
          <span>
            <Link to={`/machines/${machine.id}`} className="link">
              {machine.number}
            </Link>{' '}
            {machine.label}, {circuit.name}
          </span>
          <span className="text-muted">
            opened <Day value={head.openedAt} />
            {head.technicianName && ` by ${head.technicianName}`}
          </span>
        </div>
      </header>
      {head.parkedReason !== null && (
        <div className="mb-4">
          <Notice tone="warn" title="Parked">
            <p>
              {head.parkedReason}
              {head.parkedUntil && (
                <>
                  , until <Day value={head.parkedUntil} />
                </>
              )}
            </p>
          </Notice>
        </div>
      )}
      {head.closedReason !== null && (
        <div className="mb-4">
          <Notice tone="danger" title="Closed unsolved">
            <p>{head.closedReason}</p>
          </Notice>
        </div>
      )}
      <ChainStrip links={head.chain} caseNumber={head.number} current={current} />
      <div className="mt-6 space-y-8">
        <Outlet />
      </div>
    </article>
  );
}
