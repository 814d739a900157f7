import { data, Form, Link, useNavigation } from 'react-router';
import { CheckboxField, SelectField, TextArea, TextField } from '#app/components/forms/field.tsx';
import { Badge } from '#app/components/ui/badge.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { CATALOGUE_KIND_NAMES, CATALOGUE_KINDS } from '#app/domain/vocabulary/vocabulary.ts';
import { choicesOf } from '#app/features/cases/choices.ts';
import { RefusalNotice } from '#app/features/cases/components/refusal-notice.tsx';
import {
  addCatalogueEntry,
  changeCatalogueEntry,
  changeEntrySchema,
  newEntrySchema,
} from '#app/features/catalogue/commands.server.ts';
import { listCatalogue, shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { fieldErrors, formObject, typedValues } from '#app/features/form-fields.ts';
import { refuseFields } from '#app/features/outcome.ts';
import { readForm } from '#app/server/forms.server.ts';
import { orRefuse, requirePermission } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import type { Route } from './+types/catalogue.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Catalogue · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requirePermission(context, 'catalogue:manage');
  const kind = CATALOGUE_KINDS.find((name) => name === url.searchParams.get('kind')) ?? 'component';
  return {
    kind,
    entries: await listCatalogue(viewer.shopId, kind),
    media: choicesOf(await shopVocabulary(viewer.shopId), 'medium'),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const viewer = requirePermission(context, 'catalogue:manage');
  const form = await readForm(request);
  const intent = String(form.get('intent') ?? '');
  const now = new Date();
  if (intent === 'add') {
    const parsed = newEntrySchema.safeParse(formObject(form));
    const outcome = parsed.success
      ? await orRefuse(addCatalogueEntry(viewer, parsed.data, now))
      : refuseFields(fieldErrors(parsed.error));
    if (!outcome.ok) return data({ intent, refusal: outcome, typed: typedValues(form) }, { status: 400 });
    return redirectWithToast(`/settings/catalogue?kind=${form.get('kind')}`, 'Added to the catalogue.');
  }
  const parsed = changeEntrySchema.safeParse(formObject(form));
  if (intent !== 'change' || !parsed.success) throw data(null, { status: 400 });
  const outcome = await orRefuse(changeCatalogueEntry(viewer, parsed.data, now));
  if (!outcome.ok) return data({ intent, refusal: outcome, typed: typedValues(form) }, { status: 400 });
  return redirectWithToast(`/settings/catalogue?kind=${parsed.data.kind}`, 'Catalogue changed.');
}

export default function Catalogue({
  loaderData: { kind, entries, media },
  actionData,
}: Route.ComponentProps) {
  const pending = useNavigation().formData?.get('intent') === 'add';
  const refusal = actionData?.refusal;
  const errors = refusal?.refused === 'fields' ? refusal.fields : {};
  const typed: Record<string, string> = actionData?.intent === 'add' ? actionData.typed : {};
  return (
    <div className="space-y-8">
      <PageHeader
        title="Catalogue"
        lead="The words that cases are recorded in. Add your own, give the known ones the names your people use, or hide what you never need. Ids never change, so old cases keep their meaning."
      />
      <nav aria-label="Kinds of entries">
        <ul className="flex flex-wrap gap-2">
          {CATALOGUE_KINDS.map((name) => (
            <li key={name}>
              <Link
                to={`?kind=${name}`}
                aria-current={name === kind ? 'page' : undefined}
                className="tap inline-flex items-center rounded-full border border-edge px-4 font-semibold hover:border-action aria-[current=page]:border-action aria-[current=page]:bg-action-soft"
              >
                {CATALOGUE_KIND_NAMES[name]}
              </Link>
            </li>
          ))}
        </ul>
      </nav>
      <Panel title="Add an entry">
        <Form method="post" className="max-w-2xl space-y-5" key={`${kind}-${entries.length}`} noValidate>
          <RefusalNotice refusal={actionData?.intent === 'add' ? refusal : undefined} />
          <input type="hidden" name="kind" value={kind} />
          <div className="grid gap-5 sm:grid-cols-2">
            <TextField name="name" label="Name" defaultValue={typed.name} error={errors.name} />
            <SelectField
              name="medium"
              label="Medium"
              blank="Every medium"
              options={media}
              defaultValue={typed.medium}
              error={errors.medium}
            />
          </div>
          <TextField
            name="otherNames"
            label="What people call it"
            hint="With commas between."
            defaultValue={typed.otherNames}
            error={errors.otherNames}
          />
          <TextArea
            name="note"
            label="Note"
            optional
            rows={2}
            defaultValue={typed.note}
            error={errors.note}
          />
          <Button name="intent" value="add" pending={pending}>
            Add to {CATALOGUE_KIND_NAMES[kind].toLowerCase()}
          </Button>
        </Form>
      </Panel>
      <Panel title={CATALOGUE_KIND_NAMES[kind]}>
        <ul className="divide-y divide-line">
          {entries.map((entry) => (
            <li key={entry.id} className="py-3">
              <p className="font-semibold">
                {entry.name} {entry.isOwn && <Badge tone="action">own</Badge>}{' '}
                {entry.hidden && <Badge tone="warn">hidden</Badge>}
              </p>
              <p className="text-sm text-muted break-words">
                {entry.id}
                {entry.otherNames && `, also: ${entry.otherNames}`}
                {entry.ownNames && `, yours: ${entry.ownNames}`}
              </p>
              <details>
                <summary className="tap flex items-center text-action">Change</summary>
                <Form method="post" className="max-w-xl space-y-3 pb-3">
                  <input type="hidden" name="kind" value={kind} />
                  <input type="hidden" name="id" value={entry.id} />
                  <TextField
                    name="otherNames"
                    label="Your names for it"
                    hint="With commas between."
                    defaultValue={entry.ownNames}
                  />
                  <CheckboxField
                    name="hidden"
                    value="yes"
                    label="Hide it from choice"
                    defaultChecked={entry.hidden}
                  />
                  <Button name="intent" value="change" variant="secondary">
                    Save
                  </Button>
                </Form>
              </details>
            </li>
          ))}
        </ul>
      </Panel>
    </div>
  );
}
