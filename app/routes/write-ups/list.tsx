import { Form, Link } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { WRITE_UP_STATE_NAMES, WRITE_UP_STATES } from '#app/domain/write-ups/write-up-state.ts';
import { listWriteUps } from '#app/features/write-ups/queries.server.ts';
import { parseWriteUpList } from '#app/features/write-ups/schema.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/list.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Write-ups · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = parseWriteUpList(url.searchParams);
  return { input, ...(await listWriteUps(viewer, input)) };
}

export default function WriteUps({
  loaderData: { input, writeUps, total, pageCount },
}: Route.ComponentProps) {
  const filtered = input.q.trim() !== '' || input.state !== undefined;
  return (
    <>
      <PageHeader
        title="Write-ups"
        lead="Cause-and-fix notes: what it was, why it failed, what fixed it and how it was proved."
      />
      <Form className="mb-6 grid items-end gap-4 sm:grid-cols-[2fr_1fr_auto]" key={JSON.stringify(input)}>
        <TextField name="q" label="Look in published notes" type="search" defaultValue={input.q} />
        <SelectField
          name="state"
          label="State"
          blank="Every state"
          options={WRITE_UP_STATES.map((value) => ({ value, label: WRITE_UP_STATE_NAMES[value] }))}
          defaultValue={input.state}
        />
        <Button variant="secondary">Show</Button>
      </Form>
      <p className="mb-3 font-semibold" role="status">
        {total} {total === 1 ? 'note' : 'notes'}
      </p>
      {writeUps.length === 0 ? (
        <EmptyState
          title={filtered ? 'No note fits' : 'No notes yet'}
          action={filtered ? <ButtonLink to="/write-ups">Show every note</ButtonLink> : undefined}
        >
          {filtered ? 'Try other words.' : 'Notes are written on the last link of a case.'}
        </EmptyState>
      ) : (
        <ul className="divide-y divide-line border-y border-line">
          {writeUps.map((note) => (
            <li key={note.slug} className="py-4">
              <Link to={`/write-ups/${note.slug}`} className="link text-lg font-semibold break-words">
                {note.title}
              </Link>
              <p className="max-w-prose break-words">{note.opening}</p>
              <p className="mt-1 flex flex-wrap items-center gap-x-3 text-sm text-muted">
                <Badge tone={note.state === 'published' ? 'plain' : 'warn'}>
                  {WRITE_UP_STATE_NAMES[note.state]}
                </Badge>
                <span>
                  {note.machine}, by {note.authorName}, <Day value={note.updatedAt} />
                </span>
                <Link to={`/cases/${note.caseNumber}`} className="link">
                  Case {note.caseNumber}
                </Link>
              </p>
            </li>
          ))}
        </ul>
      )}
      <Pagination page={input.page} pageCount={pageCount} noun="notes" />
    </>
  );
}
