import type { Actor } from '#app/domain/permissions/actor.ts';
import { openCase } from '#app/features/cases/open-case.server.ts';
import { openCaseSchema } from '#app/features/cases/schema.ts';

/** Opens a case as that person and answers its number. */
export async function openTestCase(
  actor: Actor,
  machine = 'W01',
  fields: Record<string, unknown> = {},
): Promise<number> {
  const input = openCaseSchema.parse({
    machine,
    complaint: 'Blows warm uphill, fine on the road.',
    ...fields,
  });
  const outcome = await openCase(actor, input, new Date());
  if (!outcome.ok) throw new Error(`not opened: ${JSON.stringify(outcome)}`);
  return outcome.value.number;
}
