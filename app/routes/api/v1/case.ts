import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { caseAnswer } from '#app/features/api/case-answers.server.ts';
import { wholeParam } from '#app/features/api/params.server.ts';
import type { Route } from './+types/case.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => caseAnswer(await requireApiActor(args), wholeParam(args.params.number)));
}

export const action = () => methodNotAllowed('GET');
