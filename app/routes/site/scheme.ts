import { redirect } from 'react-router';
import { schemeCookie } from '#app/server/cookies.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { safePath } from '#app/server/redirects.server.ts';
import type { Route } from './+types/scheme.ts';

export function loader() {
  return redirect('/');
}

export async function action({ request }: Route.ActionArgs) {
  const form = await readForm(request);
  const scheme = form.get('scheme');
  const chosen = scheme === 'daylight' || scheme === 'lamp' ? scheme : 'system';
  return redirect(safePath(form.get('to'), '/'), {
    headers: { 'Set-Cookie': await schemeCookie.serialize(chosen) },
  });
}
