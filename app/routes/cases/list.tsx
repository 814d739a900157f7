import { Form, Link } from 'react-router';
import { ChainDots } from '#app/components/chain/chain-strip.tsx';
import { SelectField } from '#app/components/forms/field.tsx';
import { DataTable } from '#app/components/table/data-table.tsx';
import { CaseStateBadge } from '#app/components/ui/badge.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { CASE_STATE_NAMES, CASE_STATES } from '#app/domain/chain/chain.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { choicesOf } from '#app/features/cases/choices.ts';
import { parseCaseList } from '#app/features/cases/list-schema.ts';
import { listCases, listYards } from '#app/features/cases/queries.server.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/list.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Cases · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = parseCaseList(url.searchParams);
  return {
    input,
    ...(await listCases(viewer, input)),
    yards: await listYards(viewer),
    media: choicesOf(await shopVocabulary(viewer.shopId), 'medium'),
    mayOpen: may(viewer.role, 'case:open'),
  };
}

const STATE_OPTIONS = [
  { value: 'unfinished', label: 'All unfinished' },
  ...CASE_STATES.map((value) => ({ value, label: CASE_STATE_NAMES[value] })),
];

export default function Cases({ loaderData }: Route.ComponentProps) {
  const { input, cases, total, pageCount, yards, media, mayOpen } = loaderData;
  const filtered = Boolean(input.state || input.medium || input.yard || input.machine || input.mine);
  return (
    <>
      <PageHeader
        title="Cases"
        lead={`${total.toLocaleString('en-GB')} ${total === 1 ? 'case' : 'cases'}${filtered ? ' with these filters' : ''}`}
        actions={
          mayOpen && (
            <ButtonLink to="new" variant="primary">
              Open a case
            </ButtonLink>
          )
        }
      />
      <Form className="mb-6 grid items-end gap-4 sm:grid-cols-[1fr_1fr_1fr_auto]" key={JSON.stringify(input)}>
        {input.machine && <input type="hidden" name="machine" value={input.machine} />}
        <SelectField
          name="state"
          label="State"
          blank="Every state"
          options={STATE_OPTIONS}
          defaultValue={input.state}
        />
        <SelectField
          name="medium"
          label="Medium"
          blank="Every medium"
          options={media}
          defaultValue={input.medium}
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
      {cases.length === 0 ? (
        <EmptyState
          title={filtered ? 'No case fits' : 'No cases yet'}
          action={filtered ? <ButtonLink to="/cases">Show every case</ButtonLink> : undefined}
        >
          {filtered ? 'Try fewer filters.' : 'Open one when a machine comes in.'}
        </EmptyState>
      ) : (
        <DataTable
          caption="Cases"
          rows={cases}
          rowKey={({ number }) => number}
          sort={{ by: input.sort.replace('-', ''), down: input.sort.startsWith('-') }}
          columns={[
            {
              key: 'number',
              label: 'Case',
              sortable: true,
              cell: ({ number, title }) => (
                <Link to={`/cases/${number}`} className="link inline-flex min-h-11 items-center break-words">
                  {number} {title}
                </Link>
              ),
            },
            {
              key: 'machine',
              label: 'Machine',
              sortable: true,
              cell: ({ machineNumber, machineModel }) => `${machineNumber} ${machineModel}`,
            },
            {
              key: 'state',
              label: 'State',
              sortable: true,
              cell: ({ state }) => <CaseStateBadge state={state} />,
            },
            { key: 'chain', label: 'Chain', cell: ({ chain }) => <ChainDots links={chain} /> },
            { key: 'yard', label: 'Yard', cell: ({ yardName }) => yardName },
            {
              key: 'opened',
              label: 'Opened',
              sortable: true,
              cell: ({ openedAt }) => <Day value={openedAt} />,
            },
          ]}
        />
      )}
      <Pagination page={input.page} pageCount={pageCount} noun="cases" />
    </>
  );
}
