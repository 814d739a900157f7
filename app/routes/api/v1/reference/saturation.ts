import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { answerOrRefuse, readQuery } from '#app/features/api/params.server.ts';
import { answerSaturation, saturationQuery } from '#app/features/reference/answers.ts';
import type { Route } from './+types/saturation.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    await requireApiActor(args);
    return answerOrRefuse(answerSaturation(readQuery(args.url.searchParams, saturationQuery)));
  });
}

export const action = () => methodNotAllowed('GET');
