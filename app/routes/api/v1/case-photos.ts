import { ApiError, apiRoute, json, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { wholeParam } from '#app/features/api/params.server.ts';
import { listCasePhotos } from '#app/features/photos/queries.server.ts';
import { BadForm, receiveForm } from '#app/features/photos/receive.server.ts';
import { keepUploads } from '#app/features/photos/upload.server.ts';
import type { Route } from './+types/case-photos.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args);
    const { photos } = await listCasePhotos(actor, wholeParam(args.params.number));
    return { photos };
  });
}

/** Multipart: any number of files, with `link`, `role` and `caption`. Good ones are kept when others fail. */
export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('GET, POST');
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args, 'photo:add');
    const caseNumber = String(wholeParam(args.params.number));
    await listCasePhotos(actor, Number(caseNumber));
    try {
      return await receiveForm(args.request, async (received) => {
        const fields = { ...received.fields, caseNumber, circuitId: '' };
        const result = await keepUploads(actor, { ...received, fields }, new Date());
        if (result.photos.length > 0) return json(result, 201);
        const reasons = Object.fromEntries(result.errors.map(({ file, error }) => [file, error]));
        throw new ApiError(400, 'invalid', 'No photo was kept.', reasons);
      });
    } catch (error) {
      if (error instanceof BadForm) throw new ApiError(400, 'not_multipart', error.message);
      throw error;
    }
  });
}
