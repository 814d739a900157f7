import { redirect } from 'react-router';
import { closeSession } from '#app/features/auth/sessions.server.ts';
import { viewerContext } from '#app/server/context.ts';
import { sessionCookie } from '#app/server/cookies.server.ts';
import type { Route } from './+types/sign-out.ts';

export function loader() {
  return redirect('/');
}

export async function action({ context }: Route.ActionArgs) {
  const viewer = context.get(viewerContext);
  if (viewer) await closeSession(viewer);
  return redirect('/sign-in', {
    headers: { 'Set-Cookie': await sessionCookie.serialize('', { maxAge: 0 }) },
  });
}
