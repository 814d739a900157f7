import {
  apiRoute,
  methodNotAllowed,
  readJson,
  refusalError,
  requireApiActor,
} from '#app/features/api/api.server.ts';
import { newMachineBody } from '#app/features/api/schema.ts';
import { createMachine } from '#app/features/machines/commands.server.ts';
import { listMachines, loadMachine } from '#app/features/machines/queries.server.ts';
import { parseMachineList } from '#app/features/machines/schema.ts';
import type { Route } from './+types/machines.ts';

export function loader(args: Route.LoaderArgs) {
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args);
    const input = parseMachineList(args.url.searchParams);
    return { ...(await listMachines(actor, input)), page: input.page };
  });
}

export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('GET, POST');
  return apiRoute(
    args,
    async () => {
      const actor = await requireApiActor(args, 'machine:edit');
      const outcome = await createMachine(actor, await readJson(args.request, newMachineBody), new Date());
      if (!outcome.ok) throw refusalError(outcome);
      return loadMachine(actor, outcome.value.id);
    },
    201,
  );
}
