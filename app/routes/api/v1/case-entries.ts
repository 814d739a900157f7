import {
  ApiError,
  apiRoute,
  methodNotAllowed,
  readJson,
  refusalError,
  requireApiActor,
} from '#app/features/api/api.server.ts';
import { newEntryBody } from '#app/features/api/entry-bodies.ts';
import { wholeParam } from '#app/features/api/params.server.ts';
import { requireOnCase } from '#app/features/cases/change-case.server.ts';
import { addEntry } from '#app/features/cases/entries.server.ts';
import { ENTRY_SCHEMAS } from '#app/features/cases/schema.ts';
import { fieldErrors } from '#app/features/form-fields.ts';
import type { Route } from './+types/case-entries.ts';

export const loader = () => methodNotAllowed('POST');

/** One more entry on a case; the gates are those of the pages. */
export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('POST');
  return apiRoute(
    args,
    async () => {
      const actor = await requireApiActor(args, 'case:edit');
      const number = wholeParam(args.params.number);
      await requireOnCase(actor, number, 'case:edit');
      const { entry: kind, fields, override } = await readJson(args.request, newEntryBody);
      const parsed = ENTRY_SCHEMAS[kind].safeParse(fields);
      if (!parsed.success)
        throw new ApiError(400, 'invalid', 'Some fields are missing or wrong.', fieldErrors(parsed.error));
      const outcome = await addEntry({ actor, number, kind, input: parsed.data, override });
      if (!outcome.ok) throw refusalError(outcome);
      return { id: outcome.value.id, entry: kind };
    },
    201,
  );
}
