import { data, Form, useNavigation } from 'react-router';
import { RadioCards, TextField } from '#app/components/forms/field.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime, Day } from '#app/components/ui/time.tsx';
import { ROLE_NAMES, ROLES } from '#app/domain/permissions/actor.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldErrors, formObject } from '#app/features/form-fields.ts';
import { type Outcome, refuseFields } from '#app/features/outcome.ts';
import {
  addCertificate,
  certificateSchema,
  listCertificates,
  removeCertificate,
} from '#app/features/people/certificates.server.ts';
import {
  changePerson,
  endPersonSessions,
  inviteAgain,
  loadPerson,
  setActive,
} from '#app/features/people/people.server.ts';
import { changePersonSchema } from '#app/features/people/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission, wholeParam } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/person.ts';

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.person.name ?? 'Person'} · Weepmark` },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'people:manage');
  const now = new Date();
  const person = await orRefuse(loadPerson(viewer, wholeParam(params.id), now));
  return { person, certificates: await listCertificates(viewer.shopId, person.id, now) };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'people:manage');
  const userId = wholeParam(params.id);
  await orRefuse(loadPerson(viewer, userId, new Date()));
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  const outcome = await orRefuse(run());
  if (outcome.ok) return redirectWithToast(`/people/${userId}`, SAID[intent] ?? 'Saved.');
  return data({ refusal: outcome }, { status: 400 });

  async function run(): Promise<Outcome> {
    switch (intent) {
      case 'change': {
        const parsed = changePersonSchema.safeParse(formObject(form));
        return parsed.success
          ? changePerson(viewer, userId, parsed.data)
          : refuseFields(fieldErrors(parsed.error));
      }
      case 'deactivate':
        return setActive(viewer, userId, false, new Date());
      case 'activate':
        return setActive(viewer, userId, true, new Date());
      case 'end-sessions':
        return endPersonSessions(viewer, userId);
      case 'add-certificate': {
        const parsed = certificateSchema.safeParse(formObject(form));
        return parsed.success
          ? addCertificate(viewer, userId, parsed.data)
          : refuseFields(fieldErrors(parsed.error));
      }
      case 'remove-certificate':
        return removeCertificate(viewer, userId, Number(form.get('certificateId')) || 0);
      case 'invite':
        return inviteAgain(viewer, userId, new Date());
      default:
        throw data(null, { status: 400 });
    }
  }
}

const SAID: Record<string, string> = {
  change: 'Saved.',
  deactivate: 'Deactivated. Their sessions and tokens have ended.',
  activate: 'Active again.',
  'end-sessions': 'Their sessions have ended.',
  'add-certificate': 'Certificate added.',
  'remove-certificate': 'Certificate removed.',
  invite: 'The link was mailed again.',
};

export default function Person({ loaderData: { person, certificates }, actionData }: Route.ComponentProps) {
  const intent = useNavigation().formData?.get('intent');
  const refusal = actionData?.refusal;
  const errors = refusal?.refused === 'fields' ? refusal.fields : {};
  return (
    <div className="max-w-2xl space-y-8">
      <PageHeader
        title={person.name}
        lead={
          <>
            {person.email}
            {person.lastSeenAt && (
              <>
                , last seen <DateTime value={person.lastSeenAt} />
              </>
            )}
          </>
        }
      />
      <RefusalNotice refusal={refusal} />
      <Form method="post" className="space-y-5" noValidate>
        <TextField name="name" label="Name" defaultValue={person.name} error={errors.name} />
        <RadioCards
          legend="Role"
          name="role"
          options={ROLES.map((value) => ({ value, label: ROLE_NAMES[value] }))}
          defaultValue={person.role}
          error={errors.role}
        />
        <Button name="intent" value="change" pending={intent === 'change'}>
          Save
        </Button>
      </Form>
      <Panel
        title="Access"
        lead={`${person.sessions} ${person.sessions === 1 ? 'session' : 'sessions'} open${person.self ? ', one of them yours' : ''}.`}
      >
        <Form method="post" className="flex flex-wrap gap-2">
          <Button name="intent" value="end-sessions" variant="secondary" pending={intent === 'end-sessions'}>
            End all sessions
          </Button>
          {person.active && !person.joined && (
            <Button name="intent" value="invite" variant="secondary" pending={intent === 'invite'}>
              Mail the link again
            </Button>
          )}
          {person.active ? (
            <Button name="intent" value="deactivate" variant="danger" pending={intent === 'deactivate'}>
              Deactivate
            </Button>
          ) : (
            <Button name="intent" value="activate" variant="secondary" pending={intent === 'activate'}>
              Make active again
            </Button>
          )}
        </Form>
      </Panel>
      <Panel title="Certificates" lead="What they are certified for. Local law says which are needed.">
        <ul className="divide-y divide-line">
          {certificates.map(({ id, name, expiresOn, state }) => (
            <li key={id} className="flex flex-wrap items-center justify-between gap-3 py-2">
              <span>
                {name}
                {expiresOn && (
                  <>
                    , until <Day value={expiresOn} />
                  </>
                )}{' '}
                {state !== 'good' && (
                  <Badge tone={state === 'expired' ? 'danger' : 'warn'}>
                    {state === 'expired' ? 'expired' : 'expires soon'}
                  </Badge>
                )}
              </span>
              <Form method="post">
                <input type="hidden" name="certificateId" value={id} />
                <Button
                  name="intent"
                  value="remove-certificate"
                  variant="quiet"
                  aria-label={`Remove ${name}`}
                >
                  Remove
                </Button>
              </Form>
            </li>
          ))}
        </ul>
        <Form method="post" className="mt-4 space-y-4" key={certificates.length} noValidate>
          <TextField name="name" label="What it is, with its number" error={errors.name} />
          <TextField name="expiresOn" label="Until" optional type="date" error={errors.expiresOn} />
          <Button
            name="intent"
            value="add-certificate"
            variant="secondary"
            pending={intent === 'add-certificate'}
          >
            Add the certificate
          </Button>
        </Form>
      </Panel>
    </div>
  );
}
