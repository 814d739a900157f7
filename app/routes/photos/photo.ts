import { findPhotoFor, findSignedPhoto } from '#app/features/photos/access.server.ts';
import { photoAnswer } from '#app/features/photos/serve.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/photo.ts';

const SIZES = ['thumb', 'medium', 'original'] as const;

export async function loader({ request, params, context, url }: Route.LoaderArgs) {
  const id = wholeParam(params.id);
  const size = SIZES.find((name) => name === params.size);
  if (!size) throw new Response(null, { status: 404 });
  const photo = await orRefuse(
    url.searchParams.has('sig')
      ? findSignedPhoto(id, size, url.searchParams, new Date())
      : findPhotoFor(requireActor(context), id, size),
  );
  return (await photoAnswer(photo, size, request)) ?? new Response(null, { status: 404 });
}
