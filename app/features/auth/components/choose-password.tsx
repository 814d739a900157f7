import { Form, Link, useNavigation } from 'react-router';
import { FormErrors, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { FieldErrors } from '#app/features/outcome.ts';

type Props = { title: string; person: { name: string; email: string } | null; fields: FieldErrors };

export function ChoosePassword({ title, person, fields }: Props) {
  const pending = useNavigation().formMethod === 'POST';
  if (!person) {
    return (
      <div className="mx-auto w-full max-w-sm space-y-4">
        <h1 className="text-2xl font-semibold">This link no longer works</h1>
        <p>It has been used, or it is too old. Nothing was changed.</p>
        <p>
          <Link to="/forgot" className="link">
            Ask for a new link
          </Link>
        </p>
      </div>
    );
  }
  return (
    <div className="mx-auto w-full max-w-sm space-y-6">
      <h1 className="text-2xl font-semibold">{title}</h1>
      <p className="text-muted">
        For {person.name}, {person.email}. All other sessions end.
      </p>
      <Form method="post" className="space-y-5" noValidate>
        <FormErrors errors={fields} />
        <input type="hidden" name="username" autoComplete="username" value={person.email} readOnly />
        <TextField
          name="password"
          label="New password"
          type="password"
          hint="At least 10 characters. A short sentence is good."
          autoComplete="new-password"
          error={fields.password}
        />
        <TextField
          name="again"
          label="The same again"
          type="password"
          autoComplete="new-password"
          error={fields.again}
        />
        <Button type="submit" pending={pending}>
          Save and sign in
        </Button>
      </Form>
    </div>
  );
}
