import { data, Form, Link, redirect, useNavigation } from 'react-router';
import { FormErrors, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { openSession } from '#app/features/auth/sessions.server.ts';
import { authenticator, clientAddress, SignInRefused } from '#app/features/auth/sign-in.server.ts';
import { typedValues } from '#app/features/form-fields.ts';
import { viewerContext } from '#app/server/context.ts';
import { readForm } from '#app/server/forms.server.ts';
import { safePath } from '#app/server/redirects.server.ts';
import type { Route } from './+types/sign-in.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Sign in · Weepmark' }];

export function loader({ context, url }: Route.LoaderArgs) {
  const to = safePath(url.searchParams.get('to'), '/bench');
  if (context.get(viewerContext)) throw redirect(to);
  return { to };
}

export async function action({ request, url }: Route.ActionArgs) {
  const form = await readForm(request);
  const typed = typedValues(form);
  try {
    const { userId } = await authenticator.authenticate('password', withForm(request, form));
    const { cookie } = await openSession({
      userId,
      userAgent: request.headers.get('User-Agent') ?? '',
      address: clientAddress(request),
      now: new Date(),
    });
    return redirect(safePath(url.searchParams.get('to'), '/bench'), { headers: { 'Set-Cookie': cookie } });
  } catch (error) {
    if (error instanceof SignInRefused) return data({ fields: error.fields, typed }, { status: 400 });
    throw error;
  }
}

/** The strategy reads the form of a request itself. */
function withForm({ url, headers }: Request, form: FormData): Request {
  const sent = new Headers(headers);
  sent.delete('Content-Type');
  sent.delete('Content-Length');
  return new Request(url, { method: 'POST', headers: sent, body: form });
}

export default function SignIn({ actionData }: Route.ComponentProps) {
  const pending = useNavigation().formMethod === 'POST';
  const fields = actionData?.fields ?? {};
  return (
    <div className="mx-auto w-full max-w-sm space-y-6">
      <h1 className="text-2xl font-semibold">Sign in</h1>
      <Form method="post" className="space-y-5" noValidate>
        <FormErrors errors={fields} />
        <TextField
          name="email"
          label="E-mail"
          type="email"
          autoComplete="username"
          defaultValue={actionData?.typed.email}
          error={fields.email}
        />
        <TextField
          name="password"
          label="Password"
          type="password"
          autoComplete="current-password"
          error={fields.password}
        />
        <Button type="submit" pending={pending}>
          Sign in
        </Button>
      </Form>
      <p>
        <Link to="/forgot" className="link">
          Forgot the password?
        </Link>
      </p>
    </div>
  );
}
