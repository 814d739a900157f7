import { data, Form, Link, useNavigation } from 'react-router';
import { SelectField, TextField } from '#app/components/forms/field.tsx';
import { SchemeSwitch } from '#app/components/shell/scheme-switch.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import { may } from '#app/domain/permissions/matrix.ts';
import { preferredUnits } from '#app/domain/units/preferences.ts';
import { type Quantity, UNITS, unitsOf } from '#app/domain/units/units.ts';
import {
  issueApiToken,
  listOwnTokens,
  revokeApiToken,
  tokenNameField,
} from '#app/features/api-tokens/tokens.server.ts';
import { endSessions, listOwnSessions } from '#app/features/auth/sessions.server.ts';
import { fieldErrors, formObject } from '#app/features/form-fields.ts';
import { saveUnits, unitsSchema } from '#app/features/people/settings.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/settings.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Settings · Weepmark' }];

export async function loader({ context }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  return {
    units: preferredUnits(viewer.preferences),
    sessions: await listOwnSessions(viewer, new Date()),
    tokens: await listOwnTokens(viewer),
    mayCatalogue: may(viewer.role, 'catalogue:manage'),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requireActor(context);
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  switch (intent) {
    case 'units': {
      const parsed = unitsSchema.safeParse(formObject(form));
      if (!parsed.success)
        return data({ intent, fields: fieldErrors(parsed.error), token: null }, { status: 400 });
      await saveUnits(viewer, parsed.data);
      return redirectWithToast('/settings', 'Units saved.');
    }
    case 'end-sessions':
      await endSessions(viewer.userId, viewer.sessionId);
      return redirectWithToast('/settings', 'Your other sessions have ended.');
    case 'new-token': {
      const name = tokenNameField.safeParse(String(form.get('name') ?? ''));
      if (!name.success)
        return data(
          { intent, fields: { name: name.error.issues[0]?.message ?? '' }, token: null },
          { status: 400 },
        );
      return data({ intent, fields: {}, token: await issueApiToken(viewer, name.data, new Date()) });
    }
    case 'revoke-token':
      await orRefuse(revokeApiToken(viewer, Number(form.get('tokenId')) || 0, new Date()));
      return redirectWithToast('/settings', 'Token revoked.');
    default:
      throw data(null, { status: 400 });
  }
}

const QUANTITIES: { name: 'pressure' | 'temperature' | 'mass' | 'volume'; label: string }[] = [
  { name: 'pressure', label: 'Pressure' },
  { name: 'temperature', label: 'Temperature' },
  { name: 'mass', label: 'Weight' },
  { name: 'volume', label: 'Volume' },
];

const options = (quantity: Quantity) =>
  unitsOf(quantity).map((id) => ({ value: id, label: UNITS[id].label }));

export default function Settings({ loaderData, actionData, matches }: Route.ComponentProps) {
  const { units, sessions, tokens, mayCatalogue } = loaderData;
  const intent = useNavigation().formData?.get('intent');
  const fields: Record<string, string> = actionData?.fields ?? {};
  return (
    <div className="max-w-3xl space-y-8">
      <PageHeader title="Settings" />
      <Panel title="Look" lead="Daylight for the yard, Lamp for the dark shop.">
        <SchemeSwitch scheme={matches[0].loaderData.scheme} />
      </Panel>
      <Panel title="Units" lead="What your forms start with. Every reading keeps the unit it was entered in.">
        <Form method="post" className="space-y-5" noValidate>
          <div className="grid gap-5 sm:grid-cols-2">
            {QUANTITIES.map(({ name, label }) => (
              <SelectField
                key={name}
                name={name}
                label={label}
                options={options(name)}
                defaultValue={units[name]}
                error={fields[name]}
              />
            ))}
          </div>
          <Button name="intent" value="units" pending={intent === 'units'}>
            Save the units
          </Button>
        </Form>
      </Panel>
      {mayCatalogue && (
        <Panel title="Catalogue" lead="The shop’s words: parts, symptoms, methods and the rest.">
          <Link to="/settings/catalogue" className="link inline-flex min-h-11 items-center">
            Open the catalogue
          </Link>
        </Panel>
      )}
      <Panel title="Your sessions">
        <ul className="divide-y divide-line">
          {sessions.map((session) => (
            <li key={session.id} className="py-2">
              <p className="break-words">
                {session.userAgent || 'Unknown device'}{' '}
                {session.current && <Badge tone="action">this one</Badge>}
              </p>
              <p className="text-sm text-muted">
                Last seen <DateTime value={session.lastSeenAt} />
              </p>
            </li>
          ))}
        </ul>
        {sessions.length > 1 && (
          <Form method="post" className="mt-3">
            <Button
              name="intent"
              value="end-sessions"
              variant="secondary"
              pending={intent === 'end-sessions'}
            >
              End the others
            </Button>
          </Form>
        )}
      </Panel>
      <Panel
        title="API tokens"
        lead="For programs that read or write cases in your name. The API is described at /api/v1/openapi.json."
      >
        {actionData?.token && (
          <Notice title="Your new token, shown once">
            <code className="block break-all select-all">{actionData.token}</code>
          </Notice>
        )}
        <ul className="my-3 divide-y divide-line">
          {tokens.map((token) => (
            <li key={token.id} className="flex flex-wrap items-center justify-between gap-3 py-2">
              <span className="min-w-0 break-words">
                {token.name}
                <span className="block text-sm text-muted">
                  made <DateTime value={token.createdAt} />
                  {token.lastUsedAt && (
                    <>
                      , last used <DateTime value={token.lastUsedAt} />
                    </>
                  )}
                </span>
              </span>
              <Form method="post">
                <input type="hidden" name="tokenId" value={token.id} />
                <Button
                  name="intent"
                  value="revoke-token"
                  variant="danger"
                  aria-label={`Revoke ${token.name}`}
                >
                  Revoke
                </Button>
              </Form>
            </li>
          ))}
        </ul>
        <Form method="post" className="flex max-w-md items-end gap-2" key={tokens.length} noValidate>
          <div className="flex-1">
            <TextField name="name" label="What the token is for" error={fields.name} autoComplete="off" />
          </div>
          <Button name="intent" value="new-token" variant="secondary" pending={intent === 'new-token'}>
            Make one
          </Button>
        </Form>
      </Panel>
    </div>
  );
}
