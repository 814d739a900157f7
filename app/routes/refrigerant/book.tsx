import { data, Form, useNavigation, useSearchParams } from 'react-router';
import { TextArea } from '#app/components/forms/field.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/empty-state.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Pagination } from '#app/components/ui/pagination.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { unitChoices } from '#app/features/cases/choices.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { type Outcome, type Refusal, refuseFields } from '#app/features/outcome.ts';
import { certificateOf } from '#app/features/people/certificates.server.ts';
import { addCylinder, addMovement, reverseMovement } from '#app/features/refrigerant-book/commands.server.ts';
import { BookBalance } from '#app/features/refrigerant-book/components/book-balance.tsx';
import { CircuitBalances } from '#app/features/refrigerant-book/components/circuit-balances.tsx';
import { CylinderForm } from '#app/features/refrigerant-book/components/cylinder-form.tsx';
import { DateFilter } from '#app/features/refrigerant-book/components/date-filter.tsx';
import { MovementForm } from '#app/features/refrigerant-book/components/movement-form.tsx';
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
  return {
    input,
    certificate: await certificateOf(viewer, new Date()),
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
  const { input, cylinders, movements, circuits, total, pageCount, people, units } = loaderData;
  const reversing = Number(useSearchParams()[0].get('reverse')) || null;
  const sent = (name: string) => (actionData?.intent === name ? actionData : undefined);
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
        lead="The book: what came in, what went into which circuit, what came out. Double entry in grams; nothing is ever edited, only reversed."
        actions={
          <>
            <ButtonLink to={`/refrigerant/record?${period}`}>Record to print</ButtonLink>
            <ButtonLink to={`/refrigerant/export.csv?${period}`} reloadDocument>
              Export as CSV
            </ButtonLink>
          </>
        }
      />
      <BookBalance {...loaderData} />
      <Panel title="Cylinders and cans">
        {cylinders.length === 0 ? (
          <EmptyState title="No cylinder yet">Add one, then enter what is in it.</EmptyState>
        ) : (
          <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
            {cylinders.map(({ id, label, refrigerant, kindName, opened, grams }) => (
              <li key={id} className="rounded-xl border border-line bg-surface p-4">
                <p className="font-semibold break-words">{label}</p>
                <p className="figures text-lg">
                  {grams.toLocaleString('en-GB')} g {refrigerant}
                </p>
                <p className="text-muted">
                  {kindName}
                  {opened && ', opened'}
                  {grams === 0 && ', empty'}
                </p>
              </li>
            ))}
          </ul>
        )}
        {loaderData.may.write && <CylinderForm count={cylinders.length} sent={sent('cylinder')} />}
      </Panel>
      {loaderData.may.write && cylinders.length > 0 && (
        <Panel
          title="Enter a movement"
          lead="What a case’s charge page takes from a cylinder or fills into one enters the book by itself."
        >
          <MovementForm
            key={total}
            cylinders={cylinders}
            units={units}
            certificate={loaderData.certificate}
            sent={sent('movement')}
          />
        </Panel>
      )}
      {reversing !== null && loaderData.may.reverse && (
        <ReverseForm movementId={reversing} refusal={sent('reverse')?.refusal} />
      )}
      <Panel title="Movements" lead={`${total.toLocaleString('en-GB')} in this period.`}>
        <DateFilter input={input} people={people} />
        {movements.length === 0 ? (
          <EmptyState title="Nothing entered here" />
        ) : (
          <MovementTable movements={movements} mayReverse={loaderData.may.reverse} />
        )}
        <Pagination page={input.page} pageCount={pageCount} noun="movements" />
      </Panel>
      {circuits.length > 0 && (
        <Panel
          title="By circuit"
          lead="Put in and taken out over the period. What went in beyond what came out and what the plate lets it hold has leaked."
        >
          <CircuitBalances circuits={circuits} />
        </Panel>
      )}
    </div>
  );
}

function ReverseForm({ movementId, refusal }: { movementId: number; refusal: Refusal | undefined }) {
  const pending = useNavigation().formData?.get('intent') === 'reverse';
  return (
    <Panel title={`Reverse movement ${movementId}`} id="reverse">
      <Form
        method="post"
        action={`/refrigerant?reverse=${movementId}`}
        className="max-w-prose space-y-3"
        noValidate
      >
        <RefusalNotice refusal={refusal} />
        <input type="hidden" name="movementId" value={movementId} />
        <TextArea
          name="note"
          label="Why"
          rows={2}
          error={refusal?.refused === 'fields' ? refusal.fields.note : undefined}
        />
        <Button name="intent" value="reverse" variant="danger" pending={pending}>
          Reverse it
        </Button>
      </Form>
    </Panel>
  );
}
