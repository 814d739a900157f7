import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { answerOrRefuse, readQuery } from '#app/features/api/params.server.ts';
import { answerVacuum, vacuumQuery } from '#app/features/reference/answers.ts';
import type { Route } from './+types/vacuum.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    await requireApiActor(args);
    return answerOrRefuse(answerVacuum(readQuery(args.url.searchParams, vacuumQuery)));
  });
}

export const action = () => methodNotAllowed('GET');
