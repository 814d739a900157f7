import { Link } from 'react-router';
import { ChainDots } from '#app/components/chain/chain-strip.tsx';
import { Badge, CaseStateBadge } from '#app/components/ui/badge.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { LINK_NAMES } from '#app/domain/chain/chain.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { WRITE_UP_STATE_NAMES } from '#app/domain/write-ups/write-up-state.ts';
import { type CaseRowView, loadBench } from '#app/features/cases/queries.server.ts';
import { listCertificates } from '#app/features/people/certificates.server.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/bench.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Bench · Weepmark' }];

export async function loader({ context }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const now = new Date();
  const certificates = await listCertificates(viewer.shopId, viewer.userId, now);
  return {
    ...(await loadBench(viewer, now)),
    certificates: certificates.filter(({ state }) => state !== 'good'),
    role: viewer.role,
    mayOpen: may(viewer.role, 'case:open'),
  };
}

export default function Bench({
  loaderData: { certificates, atWork, parked, reviews, role, mayOpen },
}: Route.ComponentProps) {
  return (
    <div className="space-y-8">
      <PageHeader
        title="Bench"
        lead={
          role === 'tech'
            ? 'Your cases, and what each still lacks.'
            : 'The shop’s unfinished cases, and what each still lacks.'
        }
        actions={
          mayOpen && (
            <ButtonLink to="/cases/new" variant="primary">
              Open a case
            </ButtonLink>
          )
        }
      />
      {certificates.length > 0 && (
        <Notice tone="warn" title="Your certificates">
          <ul>
            {certificates.map(({ id, name, state }) => (
              <li key={id}>
                {name} {state === 'expired' ? 'has expired' : 'expires soon'}.
              </li>
            ))}
          </ul>
        </Notice>
      )}
      {atWork.length === 0 ? (
        <EmptyState title="The bench is clear" action={<ButtonLink to="/find">Find a past case</ButtonLink>}>
          No unfinished case here.
        </EmptyState>
      ) : (
        <ul className="divide-y divide-line border-y border-line">
          {atWork.map((row) => (
            <BenchCase key={row.number} row={row} />
          ))}
        </ul>
      )}
      {reviews.length > 0 && (
        <Panel title="Notes on their way">
          <ul className="divide-y divide-line">
            {reviews.map((review) => (
              <li key={review.caseNumber} className="flex flex-wrap items-center justify-between gap-3 py-2">
                <Link
                  to={`/cases/${review.caseNumber}/write-up`}
                  className="link inline-flex min-h-11 items-center"
                >
                  {review.title || `Note on case ${review.caseNumber}`}
                </Link>
                <span className="flex items-center gap-3">
                  <Badge tone={review.state === 'sent-back' ? 'warn' : 'action'}>
                    {WRITE_UP_STATE_NAMES[review.state]}
                  </Badge>
                  <span className="text-muted">by {review.authorName}</span>
                </span>
              </li>
            ))}
          </ul>
        </Panel>
      )}
      {parked.length > 0 && (
        <Panel title="Parked" lead="Waiting for a part, a machine or a day.">
          <ul className="divide-y divide-line">
            {parked.map((row) => (
              <li key={row.number} className="py-3">
                <Link to={`/cases/${row.number}`} className="link font-semibold">
                  {row.number} {row.title}
                </Link>
                <p className="break-words">
                  {row.parkedReason}
                  {row.parkedUntil && (
                    <>
                      , until <Day value={row.parkedUntil} />
                    </>
                  )}{' '}
                  {row.due && <Badge tone="warn">Due</Badge>}
                </p>
              </li>
            ))}
          </ul>
        </Panel>
      )}
    </div>
  );
}

function BenchCase({ row }: { row: CaseRowView }) {
  const next = row.chain.find(({ state }) => state !== 'done');
  return (
    <li className="grid gap-x-6 gap-y-2 py-4 sm:grid-cols-[1fr_auto]">
      <div className="min-w-0">
        <Link to={`/cases/${row.number}`} className="link text-lg font-semibold break-words">
          {row.title}
        </Link>
        <p className="text-muted">
          Case {row.number} · {row.machineNumber} {row.machineModel}
          {row.yardName && ` · ${row.yardName}`} · {row.assigneeName || 'nobody'} ·{' '}
          <Day value={row.openedAt} />
        </p>
        {next && (
          <p className="mt-1 break-words">
            <Link to={`/cases/${row.number}/${next.key}`} className="link font-semibold">
              {LINK_NAMES[next.key]}
            </Link>{' '}
            lacks {next.lacks.join(', ')}
          </p>
        )}
      </div>
      <div className="flex items-center gap-3 sm:flex-col sm:items-end">
        <CaseStateBadge state={row.state} />
        <ChainDots links={row.chain} />
      </div>
    </li>
  );
}
