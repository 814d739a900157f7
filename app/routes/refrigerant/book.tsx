import { data, Form, useNavigation, useSearchParams } from 'react-router';
import { MeasureField, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { Cautions, Notice } from '#app/components/ui/notice.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { REFRIGERANTS } from '#app/domain/refrigerant/saturation.ts';
import {
  CYLINDER_KIND_NAMES,
  CYLINDER_KINDS,
  MOVEMENT_KIND_NAMES,
  MOVEMENT_KINDS,
} from '#app/domain/refrigerant-book/book.ts';
import { cautionsFor } from '#app/domain/vocabulary/vocabulary.ts';
import { unitChoices } from '#app/features/cases/choices.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { type Outcome, refuseFields } from '#app/features/outcome.ts';
import { listCertificates } from '#app/features/people/certificates.server.ts';
import { addCylinder, addMovement, reverseMovement } from '#app/features/refrigerant-book/commands.server.ts';
import { DateFilter } from '#app/features/refrigerant-book/components/date-filter.tsx';
import { MovementTable } from '#app/features/refrigerant-book/components/movement-table.tsx';
import { loadBookPage } from '#app/features/refrigerant-book/queries.server.ts';
import { cylinderSchema, movementSchema, parseBook } from '#app/features/refrigerant-book/schema.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requireActor, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/book.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Refrigerant · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = parseBook(url.searchParams);
  const certificates = await listCertificates(viewer.shopId, viewer.userId, new Date());
  return {
    input,
    certificate: certificates.find(({ state }) => state !== 'expired')?.name ?? '',
    units: unitChoices(['mass'], viewer.preferences),
    ...(await loadBookPage(viewer, input)),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'book:write');
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  const now = new Date();
  const outcome: Outcome<unknown> = await orRefuse(run());
  if (outcome.ok) return redirectWithToast('/refrigerant', SAID[intent] ?? 'Entered.');
  return data({ intent, refusal: outcome, typed: typedValues(form) }, { status: 400 });

  async function run(): Promise<Outcome<unknown>> {
    if (intent === 'cylinder') {
      const parsed = cylinderSchema.safeParse(formObject(form));
      return parsed.success ? addCylinder(viewer, parsed.data, now) : refuseFields(fieldErrors(parsed.error));
    }
    if (intent === 'movement') {
      const parsed = movementSchema.safeParse(formObject(form));
      return parsed.success ? addMovement(viewer, parsed.data, now) : refuseFields(fieldErrors(parsed.error));
    }
    if (intent === 'reverse') {
      const note = String(form.get('note') ?? '').trim();
      if (note === '') return refuseFields({ note: 'Write why it is reversed.' });
      return reverseMovement(viewer, Number(form.get('movementId')) || 0, note.slice(0, 5000), now);
    }
    throw data(null, { status: 400 });
  }
}

const SAID: Record<string, string> = {
  cylinder: 'Cylinder added. Now enter what is in it as bought or recovered.',
  movement: 'Entered in the book.',
  reverse: 'Reversed. Now enter it as it was.',
};

export default function Book({ loaderData, actionData }: Route.ComponentProps) {
  const {
    input,
    cylinders,
    movements,
    machines,
    total,
    pageCount,
    people,
    units,
    outOfBalanceGrams,
    overdrawn,
  } = loaderData;
  const intent = useNavigation().formData?.get('intent');
  const reversing = Number(useSearchParams()[0].get('reverse')) || null;
  const sent = (name: string) => (actionData?.intent === name ? actionData : undefined);
  const wrong = (name: string): Record<string, string> => {
    const refusal = sent(name)?.refusal;
    return refusal?.refused === 'fields' ? refusal.fields : {};
  };
  const typed = (name: string): Record<string, string> => sent(name)?.typed ?? {};
  const period = new URLSearchParams(
    Object.entries({
      from: input.from,
      to: input.to,
      machine: input.machine,
      person: input.person ? String(input.person) : undefined,
    }).filter((pair): pair is [string, string] => pair[1] !== undefined),
  );
  return (
    <div className="space-y-8">
      <PageHeader
        title="Refrigerant"
        lead="The book: what came in, what went into which machine, what came out. Double entry in grams; nothing is ever edited, only reversed."
        actions={
          <>
            <ButtonLink to={`/refrigerant/record?${period}`}>Record to print</ButtonLink>
            <ButtonLink to={`/refrigerant/export.csv?${period}`} reloadDocument>
              Export as CSV
            </ButtonLink>
          </>
        }
      />
      {outOfBalanceGrams === 0 && overdrawn.length === 0 ? (
        <Notice title="The book balances">
          <p>What is in all accounts together adds up to nothing, and no cylinder is overdrawn.</p>
        </Notice>
      ) : (
        <Notice tone="danger" title="The book does not balance">
          <p>
            Out by {outOfBalanceGrams} g{overdrawn.length > 0 && `; overdrawn: ${overdrawn.join(', ')}`}.
          </p>
        </Notice>
      )}
      <Panel title="Cylinders and cans">
        {cylinders.length === 0 ? (
          <EmptyState title="No cylinder yet">Add one, then enter what is in it.</EmptyState>
        ) : (
          <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
            {cylinders.map(({ id, label, refrigerant, kindName, grams }) => (
              <li key={id} className="rounded-xl border border-line bg-surface p-4">
                <p className="font-semibold">
                  {label} <span className="font-normal text-muted">{kindName.toLowerCase()}</span>
                </p>
                <p className="figures text-lg">
                  {grams.toLocaleString('en-GB')} g {refrigerant}
                </p>
              </li>
            ))}
          </ul>
        )}
        {loaderData.may.write && (
          <details
            className="mt-4 rounded-xl border border-line bg-surface print:hidden"
            open={sent('cylinder') !== undefined}
          >
            <summary className="tap flex items-center px-4 py-2 font-semibold text-action">
              Add a cylinder or can
            </summary>
            <Form
              method="post"
              className="grid gap-5 px-4 pb-4 sm:grid-cols-3"
              key={cylinders.length}
              noValidate
            >
              <div className="sm:col-span-3">
                <RefusalNotice refusal={sent('cylinder')?.refusal} />
              </div>
              <TextField
                name="label"
                label="Number on it"
                defaultValue={typed('cylinder').label}
                error={wrong('cylinder').label}
              />
              <SelectField
                name="refrigerant"
                label="Refrigerant"
                options={REFRIGERANTS.map((value) => ({ value, label: value }))}
                defaultValue={typed('cylinder').refrigerant}
                error={wrong('cylinder').refrigerant}
              />
              <SelectField
                name="kind"
                label="It is"
                options={CYLINDER_KINDS.map((value) => ({ value, label: CYLINDER_KIND_NAMES[value] }))}
                defaultValue={typed('cylinder').kind}
                error={wrong('cylinder').kind}
              />
              <Button name="intent" value="cylinder" pending={intent === 'cylinder'}>
                Add
              </Button>
            </Form>
          </details>
        )}
      </Panel>
      {loaderData.may.write && cylinders.length > 0 && (
        <Panel title="Enter a movement">
          <Cautions cautions={cautionsFor('charge', 'refrigerant')} />
          <Form method="post" className="mt-4 max-w-3xl space-y-5" key={total} noValidate>
            <RefusalNotice refusal={sent('movement')?.refusal} />
            <div className="grid gap-5 sm:grid-cols-2">
              <SelectField
                name="kind"
                label="What happened"
                options={MOVEMENT_KINDS.map((value) => ({ value, label: MOVEMENT_KIND_NAMES[value] }))}
                defaultValue={typed('movement').kind ?? 'charged'}
                error={wrong('movement').kind}
              />
              <SelectField
                name="cylinder"
                label="Cylinder or can"
                blank="Choose"
                options={cylinders.map(({ id, label, refrigerant, grams }) => ({
                  value: String(id),
                  label: `${label}, ${refrigerant}, ${grams} g`,
                }))}
                defaultValue={typed('movement').cylinder}
                error={wrong('movement').cylinder}
              />
              <MeasureField
                name="amount"
                unitName="unit"
                label="Weight"
                units={units}
                defaultValue={typed('movement').amount}
                defaultUnit={typed('movement').unit}
                error={wrong('movement').amount}
                unitError={wrong('movement').unit}
              />
              <TextField
                name="machine"
                label="Machine"
                hint="For what was charged or recovered."
                defaultValue={typed('movement').machine}
                error={wrong('movement').machine}
                autoComplete="off"
              />
              <TextField
                name="caseNumber"
                label="Case"
                optional
                inputMode="numeric"
                defaultValue={typed('movement').caseNumber}
                error={wrong('movement').caseNumber}
              />
              <TextField
                name="certificate"
                label="Certificate of who did it"
                optional
                defaultValue={typed('movement').certificate ?? loaderData.certificate}
                error={wrong('movement').certificate}
              />
            </div>
            <TextArea
              name="note"
              label="Note"
              optional
              rows={2}
              defaultValue={typed('movement').note}
              error={wrong('movement').note}
            />
            <Button name="intent" value="movement" pending={intent === 'movement'}>
              Enter it
            </Button>
          </Form>
        </Panel>
      )}
      {reversing !== null && loaderData.may.reverse && (
        <Panel title={`Reverse movement ${reversing}`} id="reverse">
          <Form
            method="post"
            action={`/refrigerant?reverse=${reversing}`}
            className="max-w-prose space-y-3"
            noValidate
          >
            <RefusalNotice refusal={sent('reverse')?.refusal} />
            <input type="hidden" name="movementId" value={reversing} />
            <TextArea name="note" label="Why" rows={2} error={wrong('reverse').note} />
            <Button name="intent" value="reverse" variant="danger" pending={intent === 'reverse'}>
              Reverse it
            </Button>
          </Form>
        </Panel>
      )}
      <Panel title="Movements" lead={`${total} in this period.`}>
        <DateFilter input={input} people={people} />
        {movements.length === 0 ? (
          <EmptyState title="Nothing entered here" />
        ) : (
          <MovementTable movements={movements} mayReverse={loaderData.may.reverse} />
        )}
        <Pagination page={input.page} pageCount={pageCount} noun="movements" />
      </Panel>
      {machines.length > 0 && (
        <Panel
          title="By machine"
          lead="Put in less taken out over the period. What stays in a machine beyond its plate has leaked."
        >
          <ul className="figures divide-y divide-line">
            {machines.map(({ number, charged, recovered }) => (
              <li key={number} className="flex flex-wrap justify-between gap-x-6 py-2">
                <span className="font-semibold">{number}</span>
                <span>
                  {charged.toLocaleString('en-GB')} g in, {recovered.toLocaleString('en-GB')} g out,{' '}
                  {(charged - recovered).toLocaleString('en-GB')} g more in than out
                </span>
              </li>
            ))}
          </ul>
        </Panel>
      )}
    </div>
  );
}
