import { data, Form, Link, useNavigation } from 'react-router';
import { FormErrors, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { mailResetLink } from '#app/features/auth/account-links.server.ts';
import { emailField } from '#app/features/auth/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { logger } from '#app/server/logger.server.ts';
import type { Route } from './+types/forgot.ts';

export const meta: Route.MetaFunction = () => [{ title: 'A new password · Weepmark' }];

export async function action({ request }: Route.ActionArgs) {
  const typed = String((await readForm(request)).get('email') ?? '');
  const email = emailField.safeParse(typed);
  if (!email.success) {
    return data({ sent: false, typed, error: email.error.issues[0]?.message }, { status: 400 });
  }
  mailResetLink(email.data, new Date()).catch((error: unknown) => logger.error({ err: error }, 'reset mail'));
  return data({ sent: true, typed, error: undefined });
}

export default function Forgot({ actionData }: Route.ComponentProps) {
  const pending = useNavigation().formMethod === 'POST';
  const error = actionData?.error;
  return (
    <div className="mx-auto w-full max-w-sm space-y-6">
      <h1 className="text-2xl font-semibold">A new password</h1>
      {actionData?.sent ? (
        <Notice tone="info" title="Look in your mail">
          <p>If {actionData.typed} belongs to somebody here, a link is on its way. It works for an hour.</p>
        </Notice>
      ) : (
        <Form method="post" className="space-y-5" noValidate>
          <p className="text-muted">We mail you a link with which you choose a new one.</p>
          <FormErrors errors={error ? { email: error } : {}} />
          <TextField
            name="email"
            label="E-mail"
            type="email"
            autoComplete="username"
            defaultValue={actionData?.typed}
            error={error}
          />
          <Button type="submit" pending={pending}>
            Mail me a link
          </Button>
        </Form>
      )}
      <p>
        <Link to="/sign-in" className="link">
          Back to sign-in
        </Link>
      </p>
    </div>
  );
}
