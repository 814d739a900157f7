import {
  ApiError,
  apiRoute,
  methodNotAllowed,
  readJson,
  refusalError,
  requireApiActor,
} from '#app/features/api/api.server.ts';
import { caseAnswer } from '#app/features/api/case-answers.server.ts';
import { holdTestEntryBody } from '#app/features/api/entry-bodies.ts';
import { wholeParam } from '#app/features/api/params.server.ts';
import { requireOnCase } from '#app/features/cases/change-case.server.ts';
import { addHoldTest, holdTestSchema } from '#app/features/cases/hold-tests.server.ts';
import { fieldErrors } from '#app/features/form-fields.ts';
import type { Route } from './+types/case-hold-tests.ts';

export const loader = () => methodNotAllowed('POST');

/** A vacuum hold by its readings; the verdict is worked out and becomes a proof of the case. */
export function action(args: Route.ActionArgs) {
  if (args.request.method !== 'POST') return methodNotAllowed('POST');
  return apiRoute(
    args,
    async () => {
      const actor = await requireApiActor(args, 'case:edit');
      const number = wholeParam(args.params.number);
      await requireOnCase(actor, number, 'case:edit');
      const { samples, override, ...body } = await readJson(args.request, holdTestEntryBody);
      const text = samples.map(({ minutes, reading }) => `${minutes} ${reading}`).join('\n');
      const { step, litres, ambient, altitude, gauge, note } = body;
      const parsed = holdTestSchema.safeParse({
        samples: text,
        gauge,
        note,
        step: String(step),
        litres: String(litres),
        ambient: String(ambient),
        altitude: String(altitude),
      });
      if (!parsed.success)
        throw new ApiError(400, 'invalid', 'Some fields are missing or wrong.', fieldErrors(parsed.error));
      const outcome = await addHoldTest({ actor, number, input: parsed.data, override });
      if (!outcome.ok) throw refusalError(outcome);
      const { proofs, state, chain } = await caseAnswer(actor, number);
      return { proof: proofs.at(-1) ?? null, state, chain };
    },
    201,
  );
}
