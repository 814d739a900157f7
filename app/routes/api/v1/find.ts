import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { hitAnswer } from '#app/features/api/case-answers.server.ts';
import { limitParam } from '#app/features/api/params.server.ts';
import { findCases } from '#app/features/find/queries.server.ts';
import { parseFind } from '#app/features/find/schema.ts';
import type { Route } from './+types/find.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args);
    const { searchParams } = args.url;
    const limit = limitParam(searchParams, 20);
    const found = await findCases(actor, { ...parseFind(searchParams), limit });
    return {
      results: found.hits.map(hitAnswer),
      facets: Object.fromEntries(found.facets.map(({ name, options }) => [name, options])),
      total: found.total,
      repaired: found.repaired,
    };
  });
}

export const action = () => methodNotAllowed('GET');
