import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { answerOrRefuse, readQuery } from '#app/features/api/params.server.ts';
import { answerChargeWindow, chargeWindowQuery } from '#app/features/reference/answers.ts';
import type { Route } from './+types/charge-window.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    await requireApiActor(args);
    return answerOrRefuse(answerChargeWindow(readQuery(args.url.searchParams, chargeWindowQuery)));
  });
}

export const action = () => methodNotAllowed('GET');
