import { data, redirect } from 'react-router';
import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { Viewer } from '#app/server/context.ts';
import { toastHeader } from '#app/server/cookies.server.ts';
import { orRefuse } from '#app/server/guards.server.ts';
import { fieldErrors, formObject, typedValues } from '../form-fields.ts';
import { type Outcome, type Refusal, refuseFields } from '../outcome.ts';
import { saveNotes } from './commands.server.ts';
import { addEntry, changeEntry, removeEntry } from './entries.server.ts';
import { addHoldTest, holdTestSchema } from './hold-tests.server.ts';
import { addPressureTest, gaugeTestSchema, ramTestSchema } from './pressure-tests.server.ts';
import { ENTRY_LINKS, ENTRY_SCHEMAS, type EntryKind, type NotedLink, notesSchema } from './schema.ts';

export type LinkActionData = {
  /** Which form of the page was sent: `add-reading`, `change-12` or `notes`. */
  form: string;
  refusal: Refusal;
  typed: Record<string, string>;
};

type Args = { viewer: Viewer; number: number; link: NotedLink; form: FormData };

/** The action of the pages for readings, trace, repair, proof and charge: entries and the free words. */
export async function handleLinkAction({ viewer, number, link, form }: Args) {
  const intent = String(form.get('intent') ?? '');
  const typed = typedValues(form);
  if (intent === 'notes') {
    const parsed = notesSchema.safeParse(formObject(form));
    if (!parsed.success) {
      return answer(refuseFields(fieldErrors(parsed.error)), { form: 'notes', typed }, number, link, '');
    }
    const { note, version } = parsed.data;
    const outcome = await orRefuse(saveNotes({ actor: viewer, number }, link, note, version));
    return answer(outcome, { form: 'notes', typed }, number, link, 'Notes saved.');
  }
  if (intent === 'hold-test' && link === 'proof') {
    const parsed = holdTestSchema.safeParse(formObject(form));
    const outcome = parsed.success
      ? await orRefuse(addHoldTest({ actor: viewer, number, input: parsed.data, override: overrideOf(form) }))
      : refuseFields(fieldErrors(parsed.error));
    return answer(outcome, { form: 'hold-test', typed }, number, link, 'Hold test recorded.');
  }
  if (intent === 'pressure-test' && link === 'proof') {
    const parsed = (form.has('bore') ? ramTestSchema : gaugeTestSchema).safeParse(formObject(form));
    const outcome = parsed.success
      ? await orRefuse(addPressureTest({ actor: viewer, number, input: parsed.data }))
      : refuseFields(fieldErrors(parsed.error));
    return answer(outcome, { form: 'pressure-test', typed }, number, link, 'Pressure test recorded.');
  }
  const kind = String(form.get('kind') ?? '');
  if (!isKindOf(kind, link)) throw data(null, { status: 400 });
  const entryId = Number(form.get('entryId') ?? 0);
  if (intent === 'remove') {
    const outcome = await orRefuse(removeEntry({ actor: viewer, number, kind, entryId }));
    return answer(
      outcome,
      { form: `remove-${entryId}`, typed },
      number,
      link,
      'Entry removed. It stays in the history.',
    );
  }
  if (intent !== 'add' && intent !== 'change') throw data(null, { status: 400 });
  const formName = intent === 'add' ? `add-${kind}` : `change-${entryId}`;
  const parsed = ENTRY_SCHEMAS[kind].safeParse(entryForm(form));
  if (!parsed.success) {
    return answer(refuseFields(fieldErrors(parsed.error)), { form: formName, typed }, number, link, '');
  }
  const version = Number(form.get('version')) || undefined;
  const outcome =
    intent === 'add'
      ? await orRefuse(
          addEntry({ actor: viewer, number, kind, input: parsed.data, override: overrideOf(form) }),
        )
      : await orRefuse(
          changeEntry({
            actor: viewer,
            number,
            kind,
            input: parsed.data,
            entryId,
            version,
            override: overrideOf(form),
          }),
        );
  return answer(outcome, { form: formName, typed }, number, link, intent === 'add' ? 'Added.' : 'Changed.');
}

/** A lead's written reason to pass a gate. */
function overrideOf(form: FormData): string {
  return String(form.get('override') ?? '')
    .trim()
    .slice(0, 5000);
}

/** The entry's own fields; the form calls a reading's kind `readingKind` and a charge's `chargeKind`, since `kind` says what the entry is. */
function entryForm(form: FormData): Record<string, unknown> {
  const { kind: _kind, override: _override, readingKind, chargeKind, ...fields } = formObject(form);
  const own = readingKind ?? chargeKind;
  return own === undefined ? fields : { ...fields, kind: own };
}

function isKindOf(kind: string, link: NotedLink): kind is EntryKind {
  return Object.hasOwn(ENTRY_LINKS, kind) && ENTRY_LINKS[kind as EntryKind] === link;
}

async function answer(
  outcome: Outcome<unknown>,
  { form, typed }: { form: string; typed: Record<string, string> },
  number: number,
  link: LinkKey,
  text: string,
) {
  if (outcome.ok) {
    return redirect(`/cases/${number}/${link}`, { headers: await toastHeader({ tone: 'done', text }) });
  }
  const { ok: _ok, ...refusal } = outcome;
  const body: LinkActionData = { form, refusal: refusal as Refusal, typed };
  return data(body, { status: refusal.refused === 'conflict' ? 409 : 400 });
}
