import { apiRoute, methodNotAllowed, requireApiActor } from '#app/features/api/api.server.ts';
import { wholeParam } from '#app/features/api/params.server.ts';
import { loadMachine } from '#app/features/machines/queries.server.ts';
import type { Route } from './+types/machine.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => loadMachine(await requireApiActor(args), wholeParam(args.params.id)));
}

export const action = () => methodNotAllowed('GET');
