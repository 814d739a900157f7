import { PhotoSection } from '#app/components/photos/photo-section.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { circuitAction, circuitFormChoices } from '#app/features/machines/circuit-page.server.ts';
import { CircuitForm } from '#app/features/machines/components/circuit-form.tsx';
import { loadCircuit } from '#app/features/machines/queries.server.ts';
import { listCircuitPhotos } from '#app/features/photos/queries.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission, wholeParam } from '#app/server/guards.server.ts';
import type { Route } from './+types/circuit.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Circuit · Weepmark' }];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  const { machine, id, version, ...values } = await orRefuse(
    loadCircuit(viewer, wholeParam(params.id), wholeParam(params.circuitId)),
  );
  return {
    machine,
    id,
    version,
    values,
    choices: await circuitFormChoices(viewer),
    photos: await listCircuitPhotos(viewer, id),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  return circuitAction(viewer, wholeParam(params.id), wholeParam(params.circuitId), await readForm(request));
}

export default function Circuit({ loaderData, actionData }: Route.ComponentProps) {
  const { machine, id, version, values, choices, photos } = loaderData;
  return (
    <div className="space-y-8">
      <PageHeader title={`A circuit of ${machine.number}`} lead={machine.label} />
      <CircuitForm
        key={version}
        values={actionData?.typed ?? values}
        version={version}
        refusal={actionData?.refusal}
        save="Save"
        {...choices}
      />
      <PhotoSection
        title="Photos of the ports and the plate"
        circuitId={id}
        photoRole="port"
        photos={photos}
      />
    </div>
  );
}
