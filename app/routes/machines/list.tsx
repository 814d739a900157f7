import { Form, Link } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { DataTable } from '#app/components/table/data-table.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { may } from '#app/domain/permissions/matrix.ts';
import { listYards } from '#app/features/cases/queries.server.ts';
import { listMachineKinds, listMachines } from '#app/features/machines/queries.server.ts';
import { parseMachineList } from '#app/features/machines/schema.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/list.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Machines · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = parseMachineList(url.searchParams);
  return {
    input,
    ...(await listMachines(viewer, input)),
    kinds: await listMachineKinds(viewer),
    yards: await listYards(viewer),
    mayEdit: may(viewer.role, 'machine:edit'),
    mayImport: may(viewer.role, 'machine:import'),
  };
}

export default function Machines({ loaderData }: Route.ComponentProps) {
  const { input, machines, total, pageCount, kinds, yards, mayEdit, mayImport } = loaderData;
  const filtered = input.q !== '' || input.kind !== undefined || input.yard !== undefined;
  return (
    <>
      <PageHeader
        title="Machines"
        lead={`${total.toLocaleString('en-GB')} ${total === 1 ? 'machine' : 'machines'}${filtered ? ' with these filters' : ''}`}
        actions={
          <>
            {mayImport && <ButtonLink to="import">Import a fleet</ButtonLink>}
            {mayEdit && (
              <ButtonLink to="new" variant="primary">
                Add a machine
              </ButtonLink>
            )}
          </>
        }
      />
      <Form className="mb-6 grid items-end gap-4 sm:grid-cols-[2fr_1fr_1fr_auto]" key={JSON.stringify(input)}>
        <TextField name="q" label="Number, make, model or serial" type="search" defaultValue={input.q} />
        <SelectField
          name="kind"
          label="Kind"
          blank="Every kind"
          options={kinds.map((kind) => ({ value: kind, label: kind }))}
          defaultValue={input.kind}
        />
        <SelectField
          name="yard"
          label="Yard"
          blank="Every yard"
          options={yards.map(({ id, name }) => ({ value: String(id), label: name }))}
          defaultValue={input.yard ? String(input.yard) : ''}
        />
        <Button variant="secondary">Show</Button>
      </Form>
      {machines.length === 0 ? (
        <EmptyState
          title={filtered ? 'No machine fits' : 'No machines yet'}
          action={filtered ? <ButtonLink to="/machines">Show every machine</ButtonLink> : undefined}
        >
          {filtered ? 'Try fewer filters.' : 'Add one, or import the fleet from a table.'}
        </EmptyState>
      ) : (
        <DataTable
          caption="Machines"
          rows={machines}
          rowKey={({ id }) => id}
          sort={{ by: input.sort.replace('-', ''), down: input.sort.startsWith('-') }}
          columns={[
            {
              key: 'number',
              label: 'Number',
              sortable: true,
              cell: ({ id, number }) => (
                <Link to={`/machines/${id}`} className="link figures inline-flex min-h-11 items-center">
                  {number}
                </Link>
              ),
            },
            { key: 'kind', label: 'Kind', sortable: true, cell: ({ kind }) => kind },
            {
              key: 'model',
              label: 'Make and model',
              sortable: true,
              cell: ({ make, model }) => `${make} ${model}`,
            },
            { key: 'yard', label: 'Yard', sortable: true, cell: ({ yardName }) => yardName },
            {
              key: 'hours',
              label: 'Hours',
              sortable: true,
              numeric: true,
              cell: ({ hours }) => hours?.toLocaleString('en-GB') ?? '',
            },
            {
              key: 'cases',
              label: 'Cases',
              sortable: true,
              numeric: true,
              cell: ({ caseCount }) => caseCount,
            },
          ]}
        />
      )}
      <Pagination page={input.page} pageCount={pageCount} noun="machines" />
    </>
  );
}
