import { apiRoute, methodNotAllowed, readJson, requireApiActor } from '#app/features/api/api.server.ts';
import { answerOrRefuse } from '#app/features/api/params.server.ts';
import { answerLeakRate, leakRateBody } from '#app/features/reference/answers.ts';
import type { Route } from './+types/leak-rate.ts';

export const loader = () => methodNotAllowed('POST');

export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('POST');
  return apiRoute(args, async () => {
    await requireApiActor(args);
    return answerOrRefuse(answerLeakRate(await readJson(args.request, leakRateBody)));
  });
}
