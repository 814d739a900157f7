import { data } from 'react-router';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { listYards } from '#app/features/cases/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { changeMachine } from '#app/features/machines/commands.server.ts';
import { MachineForm } from '#app/features/machines/components/machine-form.tsx';
import { findMachine, listMachineKinds, loadMachine } from '#app/features/machines/queries.server.ts';
import { machineSchema } from '#app/features/machines/schema.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission, wholeParam } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/edit.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Change a machine · Weepmark' }];

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  const { number, kind, make, model, serial, year, hours, notes, yardName, version } = await orRefuse(
    loadMachine(viewer, wholeParam(params.id)),
  );
  return {
    values: { number, kind, make, model, serial, year, hours, notes, yard: yardName },
    version,
    kinds: await listMachineKinds(viewer),
    yards: (await listYards(viewer)).map(({ name }) => name),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  const machineId = wholeParam(params.id);
  await orRefuse(findMachine(viewer, machineId));
  const form = await readForm(request);
  const version = Number(form.get('version')) || undefined;
  const parsed = machineSchema.safeParse(formObject(form));
  const outcome = parsed.success
    ? await orRefuse(changeMachine({ actor: viewer, machineId, version, input: parsed.data }, new Date()))
    : refuseFields(fieldErrors(parsed.error));
  if (!outcome.ok) {
    return data(
      { refusal: outcome, typed: typedValues(form) },
      { status: outcome.refused === 'conflict' ? 409 : 400 },
    );
  }
  return redirectWithToast(`/machines/${machineId}`, 'Machine changed.');
}

export default function EditMachine({ loaderData, actionData }: Route.ComponentProps) {
  const { values, ...rest } = loaderData;
  return (
    <>
      <PageHeader title={`Change ${values.number}`} />
      <MachineForm
        key={rest.version}
        values={actionData?.typed ?? values}
        refusal={actionData?.refusal}
        save="Save"
        {...rest}
      />
    </>
  );
}
