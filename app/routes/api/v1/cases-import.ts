import { apiRoute, methodNotAllowed, readText, requireApiActor } from '#app/features/api/api.server.ts';
import { importCases } from '#app/features/case-import/import-cases.server.ts';
import type { Route } from './+types/cases-import.ts';

const MOST_BYTES = 50_000_000;

export const loader = () => methodNotAllowed('POST');

export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('POST');
  return apiRoute(args, async () => {
    const actor = await requireApiActor(args, 'case:import');
    return importCases(actor, await readText(args.request, MOST_BYTES), new Date());
  });
}
