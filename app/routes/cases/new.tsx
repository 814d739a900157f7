import { useState } from 'react';
import { data, Form, useNavigation } from 'react-router';
import { ChipPicker } from '#app/components/forms/chip-picker.tsx';
import { FormErrors, MeasureField, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { symptomChips, unitChoices } from '#app/features/cases/choices.ts';
import { AlikePanel, useAlike } from '#app/features/cases/components/alike-while-typing.tsx';
import { openCase } from '#app/features/cases/open-case.server.ts';
import { listMachineChoices } from '#app/features/cases/queries.server.ts';
import { openCaseSchema } from '#app/features/cases/schema.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { circuitFormChoices } from '#app/features/machines/circuit-page.server.ts';
import { listCircuitsByMachine } from '#app/features/machines/queries.server.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/new.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Open a case · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'case:open');
  return {
    machine: url.searchParams.get('machine')?.slice(0, 60) ?? '',
    machines: await listMachineChoices(viewer),
    circuits: await listCircuitsByMachine(viewer),
    allCircuits: (await circuitFormChoices(viewer)).groups,
    chips: symptomChips(await shopVocabulary(viewer.shopId)),
    units: unitChoices(['temperature'], viewer.preferences),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'case:open');
  const form = await readForm(request);
  const parsed = openCaseSchema.safeParse(formObject(form, ['symptoms']));
  const outcome = parsed.success
    ? await orRefuse(openCase(viewer, parsed.data, new Date()))
    : refuseFields(fieldErrors(parsed.error));
  if (!outcome.ok) {
    const fields = outcome.refused === 'fields' ? outcome.fields : {};
    return data(
      { fields, typed: { ...typedValues(form), symptoms: form.getAll('symptoms').join(',') } },
      { status: 400 },
    );
  }
  return redirectWithToast(`/cases/${outcome.value.number}`, `Case ${outcome.value.number} is open.`);
}

export default function NewCase({ loaderData, actionData }: Route.ComponentProps) {
  const { machines, circuits, allCircuits, chips, units } = loaderData;
  const typed: Record<string, string> = actionData?.typed ?? {};
  const errors: Record<string, string> = actionData?.fields ?? {};
  const pending = useNavigation().formMethod === 'POST';
  const [machine, setMachine] = useState(typed.machine ?? loaderData.machine);
  const [circuit, setCircuit] = useState(typed.circuit ?? '');
  const [complaint, setComplaint] = useState(typed.complaint ?? '');
  const [symptoms, setSymptoms] = useState((typed.symptoms ?? '').split(',').filter(Boolean));
  const own = circuits[machine.trim().toLowerCase()] ?? [];
  const medium =
    own.find(({ value }) => value === circuit)?.medium ??
    (circuit.includes(':') ? (circuit.split(':')[0] ?? '') : own.length === 1 ? (own[0]?.medium ?? '') : '');
  const alike = useAlike({ text: complaint, symptoms: symptoms.join(','), medium, machine });
  const groups = [
    ...(own.length > 0
      ? [{ label: 'On this machine', options: own.map(({ value, label }) => ({ value, label })) }]
      : []),
    ...allCircuits,
  ];
  return (
    <>
      <PageHeader
        title="Open a case"
        lead="Machine, circuit and what the operator said. The rest can follow at the machine."
      />
      <div className="grid items-start gap-8 xl:grid-cols-[minmax(0,1fr)_22rem]">
        <Form method="post" className="max-w-3xl space-y-6" noValidate>
          <FormErrors errors={errors} />
          <div className="grid gap-5 sm:grid-cols-2">
            <TextField
              name="machine"
              label="Machine"
              hint="Its own number; typing the model shows which fit."
              list="machines"
              autoCapitalize="characters"
              autoComplete="off"
              value={machine}
              onChange={(event) => setMachine(event.target.value)}
              error={errors.machine}
            />
            <SelectField
              name="circuit"
              label="Circuit"
              hint={
                own.length === 1 ? 'It has only one; leave this if that is it.' : 'Where it is lost from.'
              }
              blank={own.length === 1 ? (own[0]?.label ?? 'Choose') : 'Choose'}
              groups={groups}
              value={circuit}
              onChange={setCircuit}
              error={errors.circuit}
            />
          </div>
          <datalist id="machines">
            {machines.map(({ id, number, label }) => (
              <option key={id} value={number}>
                {label}
              </option>
            ))}
          </datalist>
          <TextArea
            name="complaint"
            label="What the operator said"
            hint="In their words."
            rows={4}
            value={complaint}
            onChange={(event) => setComplaint(event.target.value)}
            error={errors.complaint}
          />
          <div className="xl:hidden">
            <AlikePanel {...alike} />
          </div>
          <ChipPicker
            legend="Symptoms"
            name="symptoms"
            chips={medium ? chipsFor(chips, medium, allCircuits) : chips}
            selected={symptoms}
            onChange={setSymptoms}
            error={errors.symptoms}
          />
          <div className="grid gap-5 sm:grid-cols-3">
            <TextField
              name="weather"
              label="Weather"
              optional
              defaultValue={typed.weather}
              error={errors.weather}
            />
            <MeasureField
              name="ambient"
              unitName="ambientUnit"
              label="Air outside"
              optional
              units={units}
              defaultValue={typed.ambient}
              defaultUnit={typed.ambientUnit}
              error={errors.ambient}
              unitError={errors.ambientUnit}
            />
            <TextField
              name="hours"
              label="Machine hours"
              optional
              inputMode="numeric"
              defaultValue={typed.hours}
              error={errors.hours}
            />
          </div>
          <div className="sticky bottom-20 z-10 lg:static">
            <Button wide pending={pending}>
              Open the case
            </Button>
          </div>
        </Form>
        <div className="xl:sticky xl:top-6 max-xl:hidden">
          <AlikePanel {...alike} />
        </div>
      </div>
    </>
  );
}

type Chips = Route.ComponentProps['loaderData']['chips'];

/** The chips of the chosen medium first. */
function chipsFor(
  chips: Chips,
  medium: string,
  media: Route.ComponentProps['loaderData']['allCircuits'],
): Chips {
  const label = media.find(({ options }) => options[0]?.value.startsWith(`${medium}:`))?.label;
  return [...chips].sort((x, y) => Number(y.group === label) - Number(x.group === label));
}
