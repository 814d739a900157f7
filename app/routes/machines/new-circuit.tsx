import { PageHeader } from '#app/components/ui/page-header.tsx';
import { circuitAction, circuitFormChoices } from '#app/features/machines/circuit-page.server.ts';
import { CircuitForm } from '#app/features/machines/components/circuit-form.tsx';
import { findMachine } from '#app/features/machines/queries.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/new-circuit.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Add a circuit · Weepmark' }];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  const { number } = await orRefuse(findMachine(viewer, wholeParam(params.id)));
  return { number, choices: await circuitFormChoices(viewer) };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  return circuitAction(viewer, wholeParam(params.id), null, await readForm(request));
}

export default function NewCircuit({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <>
      <PageHeader title={`Add a circuit to ${loaderData.number}`} />
      <CircuitForm
        values={actionData?.typed ?? {}}
        refusal={actionData?.refusal}
        save="Add the circuit"
        {...loaderData.choices}
      />
    </>
  );
}
