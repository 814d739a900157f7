import { data } from 'react-router';
import { changePhoto, photoChangeSchema } from '#app/features/photos/commands.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission, wholeParam } from '#app/server/guards.server.ts';
import { redirectWithToast, safePath } from '#app/server/redirects.server.ts';
import type { Route } from './+types/photo.ts';

const SAID = {
  describe: 'Photo described.',
  move: 'Photo moved.',
  delete: 'Photo deleted. It can be brought back for 30 days.',
  restore: 'Photo brought back.',
} as const;

export function loader() {
  throw data(null, { status: 404 });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'photo:add');
  const form = Object.fromEntries(await readForm(request));
  const parsed = photoChangeSchema.safeParse(form);
  if (!parsed.success) throw data(null, { status: 400 });
  await orRefuse(changePhoto(viewer, wholeParam(params.id), parsed.data, new Date()));
  return redirectWithToast(safePath(form.to, '/bench'), SAID[parsed.data.intent]);
}
