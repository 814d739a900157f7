import { data, redirect } from 'react-router';
import { BadForm, receiveForm } from '#app/features/photos/receive.server.ts';
import { keepUploads } from '#app/features/photos/upload.server.ts';
import { toastHeader } from '#app/server/cookies.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { safePath } from '#app/server/redirects.server.ts';
import type { Route } from './+types/photos-upload.ts';

export function loader() {
  throw data(null, { status: 404 });
}

/** Takes photos in: answers JSON to scripts, and leads a plain form back to its page. */
export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'photo:add');
  try {
    return await receiveForm(request, async (received) => {
      const result = await orRefuse(keepUploads(viewer, received, new Date()));
      if (request.headers.get('Accept')?.includes('application/json')) {
        return Response.json(result, {
          status: result.photos.length > 0 || result.errors.length === 0 ? 200 : 400,
        });
      }
      const { photos, errors } = result;
      const kept = `${photos.length} ${photos.length === 1 ? 'photo' : 'photos'} added.`;
      const text = [kept, ...errors.map(({ file, error }) => `${file}: ${error}`)].join(' ');
      const headers = await toastHeader({
        tone: errors.length > 0 ? 'warn' : 'done',
        text: text.slice(0, 1500),
      });
      return redirect(safePath(received.fields.to, '/bench'), { headers });
    });
  } catch (error) {
    if (error instanceof BadForm)
      return Response.json({ photos: [], errors: [{ file: '', error: error.message }] }, { status: 400 });
    throw error;
  }
}
