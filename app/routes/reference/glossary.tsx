import { Form } from 'react-router';
import { TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { glossaryEntries } from '#app/domain/vocabulary/glossary.ts';
import type { Route } from './+types/glossary.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Glossary · Weepmark' }];

export function loader({ url }: Route.LoaderArgs) {
  const q = (url.searchParams.get('q') ?? '').slice(0, 200);
  return { q, entries: glossaryEntries(q) };
}

export default function Glossary({ loaderData: { q, entries } }: Route.ComponentProps) {
  return (
    <>
      <PageHeader
        title="Glossary"
        lead="Words that mean the same, or nearly, in this trade. Find knows them too."
      />
      <Form className="mb-6 flex max-w-md items-end gap-2" key={q}>
        <div className="flex-1">
          <TextField name="q" label="A word" type="search" defaultValue={q} />
        </div>
        <Button variant="secondary">Look up</Button>
      </Form>
      {entries.length === 0 ? (
        <EmptyState title="Not in the glossary">Try a shorter word.</EmptyState>
      ) : (
        <dl className="columns-1 gap-8 sm:columns-2">
          {entries.map(({ id, head, same, near, note }) => (
            <div key={id} className="mb-4 break-inside-avoid">
              <dt className="font-semibold">{head}</dt>
              {same.length > 0 && <dd>Also: {same.join(', ')}</dd>}
              {near.length > 0 && <dd className="text-muted">Near it: {near.join(', ')}</dd>}
              {note && <dd className="text-sm text-muted">{note}</dd>}
            </div>
          ))}
        </dl>
      )}
    </>
  );
}
