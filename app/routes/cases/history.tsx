import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { listHistory } from '#app/features/cases/queries.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/history.ts';

export async function loader({ context, params, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const page = Math.min(Math.max(Math.trunc(Number(url.searchParams.get('page'))) || 1, 1), 10_000);
  return { page, ...(await orRefuse(listHistory(viewer, wholeParam(params.number), page))) };
}

const spelled = (id: string) =>
  id
    .replaceAll('-', ' ')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .toLowerCase();

export default function History({ loaderData: { entries, page, pageCount } }: Route.ComponentProps) {
  return (
    <Panel title="History" lead="Who changed what and when. Nothing here can be edited.">
      {entries.length === 0 ? (
        <EmptyState title="Nothing has changed yet" />
      ) : (
        <ol className="divide-y divide-line border-y border-line">
          {entries.map((entry) => (
            <li key={entry.id} className="grid gap-x-6 py-3 sm:grid-cols-[13rem_1fr]">
              <p className="text-muted">
                <DateTime value={entry.at} />
              </p>
              <div className="min-w-0">
                <p>
                  <span className="font-semibold">{entry.byName || 'Weepmark'}</span>,{' '}
                  {spelled(entry.subject)}: {spelled(entry.action)}
                </p>
                {entry.details.length > 0 && (
                  <ul className="text-sm text-muted">
                    {entry.details.map(({ name, value }) => (
                      <li key={name} className="break-words whitespace-pre-line">
                        {spelled(name)}: {value}
                      </li>
                    ))}
                  </ul>
                )}
              </div>
            </li>
          ))}
        </ol>
      )}
      <Pagination page={page} pageCount={pageCount} noun="history" />
    </Panel>
  );
}
