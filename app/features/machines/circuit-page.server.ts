import { data } from 'react-router';
import { entriesFor, mediumName } from '#app/domain/vocabulary/vocabulary.ts';
import { unitChoices } from '#app/features/cases/choices.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { refuseFields } from '#app/features/outcome.ts';
import type { Viewer } from '#app/server/context.ts';
import { orRefuse } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import { saveCircuit } from './commands.server.ts';
import { findMachine } from './queries.server.ts';
import { circuitSchema } from './schema.ts';

const REFRIGERANTS = [
  'R-134a',
  'R-1234yf',
  'R-12',
  'R-22',
  'R-152a',
  'R-744',
  'R-290',
  'R-404A',
  'R-407C',
  'R-410A',
  'R-513A',
];

/** What the circuit form offers to choose from. */
export async function circuitFormChoices(viewer: Viewer) {
  const vocabulary = await shopVocabulary(viewer.shopId);
  return {
    groups: entriesFor(vocabulary, 'medium').map((medium) => ({
      label: mediumName(vocabulary, medium.id),
      options: entriesFor(vocabulary, 'circuit', medium.id).map(({ id, name }) => ({
        value: `${medium.id}:${id}`,
        label: name,
      })),
    })),
    units: unitChoices(['mass', 'volume'], viewer.preferences),
    refrigerants: REFRIGERANTS,
  };
}

export async function circuitAction(
  viewer: Viewer,
  machineId: number,
  circuitId: number | null,
  form: FormData,
) {
  await orRefuse(findMachine(viewer, machineId));
  const version = Number(form.get('version')) || undefined;
  const parsed = circuitSchema.safeParse(formObject(form));
  const outcome = parsed.success
    ? await orRefuse(
        saveCircuit({ actor: viewer, machineId, circuitId, version, input: parsed.data }, new Date()),
      )
    : refuseFields(fieldErrors(parsed.error));
  if (!outcome.ok) {
    return data(
      { refusal: outcome, typed: typedValues(form) },
      { status: outcome.refused === 'conflict' ? 409 : 400 },
    );
  }
  return redirectWithToast(
    `/machines/${machineId}`,
    circuitId === null ? 'Circuit added.' : 'Circuit changed.',
  );
}
