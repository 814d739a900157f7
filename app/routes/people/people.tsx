import { data, Form, Link, useNavigation } from 'react-router';
import { RadioCards, TextField } from '#app/components/forms/field.tsx';
import { DataTable } from '#app/components/table/data-table.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { ROLE_NAMES, ROLES } from '#app/domain/permissions/actor.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { listYards } from '#app/features/cases/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { addPerson, listPeople, saveYard } from '#app/features/people/people.server.ts';
import { addPersonSchema, yardSchema } from '#app/features/people/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/people.ts';

export const meta: Route.MetaFunction = () => [{ title: 'People · Weepmark' }];

export async function loader({ context }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'people:manage');
  return { people: await listPeople(viewer, new Date()), yards: await listYards(viewer) };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'people:manage');
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  if (intent === 'add-yard') {
    const parsed = yardSchema.safeParse(formObject(form));
    const outcome = parsed.success
      ? await orRefuse(saveYard(viewer, parsed.data))
      : refuseFields(fieldErrors(parsed.error));
    if (outcome.ok) return redirectWithToast('/people', 'Yard saved.');
    return data({ intent, refusal: outcome, typed: typedValues(form) }, { status: 400 });
  }
  if (intent !== 'add') throw data(null, { status: 400 });
  const parsed = addPersonSchema.safeParse(formObject(form));
  const outcome = parsed.success
    ? await orRefuse(addPerson(viewer, parsed.data, new Date()))
    : refuseFields(fieldErrors(parsed.error));
  if (outcome.ok) return redirectWithToast('/people', 'Added. A mail with a link is on its way.');
  return data({ intent, refusal: outcome, typed: typedValues(form) }, { status: 400 });
}

const ROLE_HINTS = {
  tech: 'Opens and works on cases',
  lead: 'Reviews, publishes, overrides',
  office: 'Machines, reports, exports',
  admin: 'People, catalogue, yards',
} as const;

export default function People({ loaderData: { people, yards }, actionData }: Route.ComponentProps) {
  const intent = useNavigation().formData?.get('intent');
  const refusalOf = (name: string) => (actionData?.intent === name ? actionData.refusal : undefined);
  const adding = refusalOf('add');
  const errors = adding?.refused === 'fields' ? adding.fields : {};
  const typed: Record<string, string> = actionData?.intent === 'add' ? actionData.typed : {};
  const yardRefusal = refusalOf('add-yard');
  return (
    <div className="space-y-8">
      <PageHeader title="People" lead="Who works here, in which role, and who is signed in." />
      <DataTable
        caption="People of this shop"
        rows={people}
        rowKey={({ id }) => id}
        columns={[
          {
            key: 'name',
            label: 'Name',
            cell: ({ id, name }) => (
              <Link to={`/people/${id}`} className="link inline-flex min-h-11 items-center">
                {name}
              </Link>
            ),
          },
          { key: 'email', label: 'E-mail', cell: ({ email }) => email },
          { key: 'role', label: 'Role', cell: ({ roleName }) => roleName },
          {
            key: 'state',
            label: 'State',
            cell: ({ active, joined }) =>
              active ? (
                joined ? (
                  'active'
                ) : (
                  <Badge tone="warn">invited</Badge>
                )
              ) : (
                <Badge tone="danger">not active</Badge>
              ),
          },
          { key: 'sessions', label: 'Sessions', numeric: true, cell: ({ sessions }) => sessions },
          {
            key: 'seen',
            label: 'Last seen',
            cell: ({ lastSeenAt }) => (lastSeenAt ? <Day value={lastSeenAt} /> : ''),
          },
        ]}
      />
      <Panel title="Add a person" lead="They get a mail with a link and choose their own password.">
        <Form method="post" className="max-w-2xl space-y-5" key={people.length} noValidate>
          <RefusalNotice refusal={adding} />
          <div className="grid gap-5 sm:grid-cols-2">
            <TextField
              name="name"
              label="Name"
              defaultValue={typed.name}
              error={errors.name}
              autoComplete="off"
            />
            <TextField
              name="email"
              label="E-mail"
              type="email"
              defaultValue={typed.email}
              error={errors.email}
              autoComplete="off"
            />
          </div>
          <RadioCards
            legend="Role"
            name="role"
            options={ROLES.map((value) => ({ value, label: ROLE_NAMES[value], hint: ROLE_HINTS[value] }))}
            defaultValue={typed.role ?? 'tech'}
            error={errors.role}
          />
          <Button name="intent" value="add" pending={intent === 'add'}>
            Add the person
          </Button>
        </Form>
      </Panel>
      <Panel title="Yards">
        <p>
          {yards.length > 0
            ? yards.map(({ name, altitudeM }) => `${name} (${altitudeM} m)`).join(', ')
            : 'No yard yet.'}
        </p>
        <Form
          method="post"
          className="mt-4 flex max-w-2xl flex-wrap items-end gap-3"
          key={yards.length}
          noValidate
        >
          <div className="flex-1">
            <TextField
              name="name"
              label="Add a yard, or name one to set its altitude"
              error={yardRefusal?.refused === 'fields' ? yardRefusal.fields.name : undefined}
            />
          </div>
          <div className="w-32">
            <TextField
              name="altitude"
              label="Altitude in m"
              inputMode="numeric"
              error={yardRefusal?.refused === 'fields' ? yardRefusal.fields.altitude : undefined}
            />
          </div>
          <Button name="intent" value="add-yard" variant="secondary" pending={intent === 'add-yard'}>
            Save
          </Button>
        </Form>
      </Panel>
    </div>
  );
}
