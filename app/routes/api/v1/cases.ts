import {
  apiRoute,
  methodNotAllowed,
  readJson,
  refusalError,
  requireApiActor,
} from '#app/features/api/api.server.ts';
import { caseAnswer } from '#app/features/api/case-answers.server.ts';
import { newCaseBody } from '#app/features/api/schema.ts';
import { parseCaseList } from '#app/features/cases/list-schema.ts';
import { openCase } from '#app/features/cases/open-case.server.ts';
import { listCases } from '#app/features/cases/queries.server.ts';
import type { Route } from './+types/cases.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args);
    const input = parseCaseList(args.url.searchParams);
    return { ...(await listCases(actor, input)), page: input.page };
  });
}

export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('GET, POST');
  return apiRoute(
    args,
    async () => {
      const actor = await requireApiActor(args, 'case:open');
      const outcome = await openCase(actor, await readJson(args.request, newCaseBody), new Date());
      if (!outcome.ok) throw refusalError(outcome);
      return caseAnswer(actor, outcome.value.number);
    },
    201,
  );
}
