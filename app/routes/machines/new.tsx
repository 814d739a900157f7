import { data } from 'react-router';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { listYards } from '#app/features/cases/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { createMachine } from '#app/features/machines/commands.server.ts';
import { MachineForm } from '#app/features/machines/components/machine-form.tsx';
import { listMachineKinds } from '#app/features/machines/queries.server.ts';
import { machineSchema } from '#app/features/machines/schema.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/new.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Add a machine · Weepmark' }];

export async function loader({ context }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  return { kinds: await listMachineKinds(viewer), yards: (await listYards(viewer)).map(({ name }) => name) };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'machine:edit');
  const form = await readForm(request);
  const parsed = machineSchema.safeParse(formObject(form));
  const outcome = parsed.success
    ? await orRefuse(createMachine(viewer, parsed.data, new Date()))
    : refuseFields(fieldErrors(parsed.error));
  if (!outcome.ok) return data({ refusal: outcome, typed: typedValues(form) }, { status: 400 });
  return redirectWithToast(`/machines/${outcome.value.id}`, 'Machine added. Now add its circuits.');
}

export default function NewMachine({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <>
      <PageHeader title="Add a machine" />
      <MachineForm
        values={actionData?.typed ?? {}}
        refusal={actionData?.refusal}
        save="Add the machine"
        {...loaderData}
      />
    </>
  );
}
