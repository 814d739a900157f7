import { Search } from 'lucide-react';
import { Form, Link, useNavigation } from 'react-router';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { HitList } from '#app/features/find/components/hit-list.tsx';
import { findCases } from '#app/features/find/queries.server.ts';
import { FACET_NAMES, type FacetName, type FindInput, parseFind } from '#app/features/find/schema.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/find.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData?.input.q ? `${loaderData.input.q.slice(0, 60)} · Find · Weepmark` : 'Find · Weepmark' },
];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = parseFind(url.searchParams);
  return { input, found: await findCases(viewer, input) };
}

export default function Find({ loaderData: { input, found } }: Route.ComponentProps) {
  const busy = useNavigation().location?.pathname === '/find';
  const asked = input.q.trim() !== '';
  const chosen = chosenFilters(input);
  const notes = asked
    ? found.hits.flatMap(({ note, number }) => (note ? [{ ...note, number }] : [])).slice(0, 3)
    : [];
  return (
    <div className="space-y-6">
      <header>
        <h1 className="mb-3 text-2xl font-semibold sm:text-3xl">Find</h1>
        <Form role="search" className="flex gap-2" key={input.q}>
          {chosen.map(({ name, value }) => (
            <input key={name} type="hidden" name={name} value={value} />
          ))}
          <div className="relative min-w-0 flex-1">
            <Search className="pointer-events-none absolute top-3.5 left-3 size-5 text-muted" aria-hidden />
            <input
              type="search"
              name="q"
              defaultValue={input.q}
              aria-label="What was it like?"
              placeholder="blows warm uphill, fine on the road"
              className="h-12 w-full rounded-lg border border-edge bg-surface pr-3 pl-10 text-base placeholder:text-muted"
            />
          </div>
          <Button pending={busy}>Find</Button>
        </Form>
        <p className="mt-2 text-sm text-muted">
          The operator’s words, a part or its number, a machine, a case number. Slang and misspellings are
          understood.
        </p>
      </header>
      {found.repaired.length > 0 && (
        <p role="status">
          Also looked for {found.repaired.map(({ from, to }) => `“${to}” beside “${from}”`).join(', ')}.
        </p>
      )}
      {found.machine && (
        <Notice title={`Machine ${found.machine.number}`}>
          <p>
            <Link to={`/machines/${found.machine.id}`} className="link">
              {found.machine.label}
            </Link>
            , its cases first.
          </p>
        </Notice>
      )}
      <div className="grid gap-8 lg:grid-cols-[minmax(0,1fr)_15rem]">
        <div className="min-w-0 space-y-6">
          {notes.length > 0 && (
            <Panel title="Published notes">
              <ul className="space-y-1">
                {notes.map(({ slug, title, number }) => (
                  <li key={slug}>
                    <Link
                      to={`/write-ups/${slug}`}
                      className="link inline-flex min-h-11 items-center font-semibold"
                    >
                      {title}
                    </Link>{' '}
                    <span className="text-muted">from case {number}</span>
                  </li>
                ))}
              </ul>
            </Panel>
          )}
          <section aria-label="Cases" className={busy ? 'opacity-60' : ''}>
            <p className="mb-3 font-semibold" role="status">
              {found.total.toLocaleString('en-GB')} {found.total === 1 ? 'case' : 'cases'}
              {!asked && ', newest first'}
            </p>
            {found.hits.length === 0 ? (
              <EmptyState
                title="Nothing like that on record"
                action={
                  chosen.length > 0 ? (
                    <ButtonLink to={`/find?${new URLSearchParams({ q: input.q })}`}>
                      Look without filters
                    </ButtonLink>
                  ) : undefined
                }
              >
                Say it with other words, fewer of them, or name the part. If it is new, your case will be the
                first.
              </EmptyState>
            ) : (
              <HitList hits={found.hits} />
            )}
            <Pagination page={input.page} pageCount={found.pageCount} noun="cases" />
          </section>
        </div>
        <aside aria-label="Narrow down" className="space-y-2 max-lg:order-first">
          <details className="lg:hidden">
            <summary className="tap flex items-center font-semibold text-action">
              Narrow down{chosen.length > 0 && ` (${chosen.length} chosen)`}
            </summary>
            <Facets found={found.facets} input={input} />
          </details>
          <div className="max-lg:hidden">
            <Facets found={found.facets} input={input} />
          </div>
        </aside>
      </div>
    </div>
  );
}

function chosenFilters(input: FindInput): { name: FacetName; value: string }[] {
  const names = Object.keys(FACET_NAMES) as FacetName[];
  return names.flatMap((name) => (input[name] === undefined ? [] : [{ name, value: String(input[name]) }]));
}

function Facets({
  found,
  input,
}: {
  found: Route.ComponentProps['loaderData']['found']['facets'];
  input: FindInput;
}) {
  const address = (name: FacetName, value: string | null) => {
    const params = new URLSearchParams(input.q ? { q: input.q } : {});
    for (const chosen of chosenFilters(input))
      if (chosen.name !== name) params.set(chosen.name, chosen.value);
    if (value !== null) params.set(name, value);
    return `/find?${params}`;
  };
  return (
    <div className="space-y-5">
      {found.map(({ name, options }) => {
        const chosen = input[name] === undefined ? null : String(input[name]);
        return (
          <section key={name} aria-label={FACET_NAMES[name]}>
            <h2 className="eyebrow mb-1">{FACET_NAMES[name]}</h2>
            <ul>
              {options.map(({ value, label, count }) => (
                <li key={value}>
                  <Link
                    to={address(name, value === chosen ? null : value)}
                    aria-current={value === chosen ? 'true' : undefined}
                    className="flex min-h-11 items-center justify-between gap-3 rounded-lg px-2 hover:bg-raised aria-[current=true]:bg-action-soft aria-[current=true]:font-semibold lg:min-h-9"
                  >
                    <span className="min-w-0 break-words">{label}</span>
                    <span className="figures text-muted">
                      {value === chosen ? '× ' : ''}
                      {count}
                    </span>
                  </Link>
                </li>
              ))}
            </ul>
          </section>
        );
      })}
    </div>
  );
}
