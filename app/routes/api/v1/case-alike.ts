import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { alikeAnswer } from '#app/features/api/case-answers.server.ts';
import { limitParam, wholeParam } from '#app/features/api/params.server.ts';
import { alikeCases } from '#app/features/find/alike.server.ts';
import type { Route } from './+types/case-alike.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args);
    const hits = await alikeCases(
      actor,
      wholeParam(args.params.number),
      limitParam(args.url.searchParams, 10),
    );
    return { results: hits.map(alikeAnswer) };
  });
}

export const action = () => methodNotAllowed('GET');
