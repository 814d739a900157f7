import { data, redirect } from 'react-router';
import { fieldErrors } from '#app/features/form-fields.ts';
import { readForm } from '#app/server/forms.server.ts';
import { findAccountLink, spendPasswordLink } from './account-links.server.ts';
import { newPasswordSchema } from './schema.ts';
import { openSession } from './sessions.server.ts';
import { clientAddress } from './sign-in.server.ts';

/** Loader of the two pages that a mailed link leads to. */
export async function loadPasswordLink(token: string, purpose: 'reset' | 'join') {
  const person = await findAccountLink(token, purpose, new Date());
  return data(
    { person: person && { name: person.name, email: person.email } },
    { status: person ? 200 : 404 },
  );
}

/** Their action: sets the password and signs in. */
export async function choosePassword(request: Request, token: string, purpose: 'reset' | 'join') {
  const parsed = newPasswordSchema.safeParse(Object.fromEntries(await readForm(request)));
  if (!parsed.success) return data({ fields: fieldErrors(parsed.error) }, { status: 400 });
  const now = new Date();
  const used = await spendPasswordLink(token, purpose, parsed.data.password, now);
  if (!used)
    return data(
      { fields: { '': 'This link has been used or is too old. Ask for a new one.' } },
      { status: 400 },
    );
  const { cookie } = await openSession({
    userId: used.userId,
    userAgent: request.headers.get('User-Agent') ?? '',
    address: clientAddress(request),
    now,
  });
  return redirect('/bench', { headers: { 'Set-Cookie': cookie } });
}
