import { data, Form, useNavigation } from 'react-router';
import { ChipPicker } from '#app/components/forms/chip-picker.tsx';
import { MeasureField, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { may } from '#app/domain/permissions/matrix.ts';
import { requireOnCase } from '#app/features/cases/change-case.server.ts';
import { symptomChips, unitChoices } from '#app/features/cases/choices.ts';
import { saveComplaint } from '#app/features/cases/commands.server.ts';
import { LinkFrame } from '#app/features/cases/components/link-frame.tsx';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { loadLinks } from '#app/features/cases/link-views.server.ts';
import { complaintSchema } from '#app/features/cases/schema.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { listCircuitChoices } from '#app/features/machines/queries.server.ts';
import { refuseFields, versionToSend } from '#app/features/outcome.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor, wholeParam } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/complaint.ts';

export async function loader({ context, params }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  const { row, vocabulary, view } = await orRefuse(loadLinks(viewer, number));
  return {
    complaint: view.complaint,
    version: row.versions.complaint ?? 1,
    lacks: row.chain.find(({ key }) => key === 'complaint')?.lacks ?? [],
    chips: symptomChips(vocabulary, row.medium),
    circuits: await listCircuitChoices(viewer, row.machineId),
    circuitId: row.circuitId,
    units: unitChoices(['temperature'], viewer.preferences),
    mayEdit: may(viewer.role, 'case:edit'),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const viewer = requireActor(context);
  const number = wholeParam(params.number);
  await orRefuse(requireOnCase(viewer, number, 'case:edit'));
  const form = await readForm(request);
  const parsed = complaintSchema.safeParse(formObject(form, ['symptoms']));
  const outcome = parsed.success
    ? await orRefuse(saveComplaint({ actor: viewer, number }, parsed.data))
    : refuseFields(fieldErrors(parsed.error));
  if (outcome.ok) return redirectWithToast(`/cases/${number}/complaint`, 'Complaint saved.');
  const typed = { ...typedValues(form), symptoms: form.getAll('symptoms').join(',') };
  return data({ refusal: outcome, typed }, { status: outcome.refused === 'conflict' ? 409 : 400 });
}

export default function Complaint({ loaderData, actionData }: Route.ComponentProps) {
  const { complaint, chips, circuits, circuitId, units, version, mayEdit } = loaderData;
  const pending = useNavigation().formMethod === 'POST';
  if (!mayEdit) {
    return (
      <LinkFrame lacks={loaderData.lacks}>
        <Panel title="What the operator said">
          <p className="max-w-prose break-words whitespace-pre-line">{complaint.text}</p>
        </Panel>
        <Facts
          facts={[
            { label: 'Symptoms', value: complaint.symptoms.join(', ') },
            {
              label: 'Weather',
              value: [complaint.weather, complaint.ambientLabel].filter(Boolean).join(', '),
            },
            { label: 'Machine hours', value: complaint.hours },
          ]}
        />
      </LinkFrame>
    );
  }
  const refusal = actionData?.refusal;
  const typed: Record<string, string> = actionData?.typed ?? {};
  const errors = refusal?.refused === 'fields' ? refusal.fields : {};
  return (
    <LinkFrame lacks={loaderData.lacks}>
      <Form method="post" key={version} className="max-w-3xl space-y-6" noValidate>
        <input type="hidden" name="version" value={versionToSend(refusal, version)} />
        <RefusalNotice refusal={refusal} />
        <TextArea
          name="complaint"
          label="What the operator said"
          hint="In their words."
          rows={5}
          defaultValue={typed.complaint ?? complaint.text}
          error={errors.complaint}
        />
        <ChipPicker
          legend="Symptoms"
          name="symptoms"
          chips={chips}
          selected={typed.symptoms === undefined ? complaint.symptomIds : typed.symptoms.split(',')}
          error={errors.symptoms}
        />
        <SelectField
          name="circuitId"
          label="Circuit"
          options={circuits}
          defaultValue={typed.circuitId ?? String(circuitId)}
          error={errors.circuitId}
        />
        <div className="grid gap-5 sm:grid-cols-3">
          <TextField
            name="weather"
            label="Weather"
            optional
            defaultValue={typed.weather ?? complaint.weather}
            error={errors.weather}
          />
          <MeasureField
            name="ambient"
            unitName="ambientUnit"
            label="Air outside"
            optional
            units={units}
            defaultValue={typed.ambient ?? complaint.ambient}
            defaultUnit={typed.ambientUnit ?? complaint.ambientUnit}
            error={errors.ambient}
            unitError={errors.ambientUnit}
          />
          <TextField
            name="hours"
            label="Machine hours"
            optional
            inputMode="numeric"
            defaultValue={typed.hours ?? complaint.hours ?? ''}
            error={errors.hours}
          />
        </div>
        <Button pending={pending}>Save the complaint</Button>
      </Form>
    </LinkFrame>
  );
}
