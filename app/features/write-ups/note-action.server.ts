import { data } from 'react-router';
import type { Viewer } from '#app/server/context.ts';
import { orRefuse } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import { requireOnCase } from '../cases/change-case.server.ts';
import { fieldErrors, formObject, typedValues } from '../form-fields.ts';
import { type Outcome, type Refusal, refuseFields } from '../outcome.ts';
import {
  publishWriteUp,
  saveWriteUp,
  sendBackWriteUp,
  submitWriteUp,
  withdrawWriteUp,
} from './commands.server.ts';
import { wordsSchema, writeUpSchema } from './schema.ts';

type Result = { outcome: Outcome<unknown>; said: string; to?: string };

/** The action of the page on which a case's note is written, reviewed and published. */
export async function noteAction(viewer: Viewer, number: number, form: FormData) {
  const intent = String(form.get('intent') ?? '');
  await orRefuse(requireOnCase(viewer, number, 'write-up:write'));
  const {
    outcome,
    said,
    to = `/cases/${number}/write-up`,
  } = await orRefuse(run(intent, viewer, number, form));
  if (outcome.ok) return redirectWithToast(to, said);
  const { ok: _ok, ...refusal } = outcome;
  const typed = { ...typedValues(form), photos: form.getAll('photos').join(',') };
  return data(
    { intent, refusal: refusal as Refusal, typed },
    { status: refusal.refused === 'fields' ? 400 : 409 },
  );
}

async function run(intent: string, viewer: Viewer, number: number, form: FormData): Promise<Result> {
  const target = { actor: viewer, number };
  const now = new Date();
  switch (intent) {
    case 'save':
    case 'submit':
    case 'publish':
    case 'publish-now':
      return writeNote(intent, target, form, now);
    case 'send-back':
    case 'withdraw': {
      const parsed = wordsSchema.safeParse(formObject(form));
      if (!parsed.success) return { outcome: refuseFields(fieldErrors(parsed.error)), said: '' };
      const { words } = parsed.data;
      return intent === 'send-back'
        ? { outcome: await sendBackWriteUp(target, words, now), said: 'Sent back with your remarks.' }
        : { outcome: await withdrawWriteUp(target, words, now), said: 'Note withdrawn.' };
    }
    default:
      throw data(null, { status: 400 });
  }
}

type Target = Parameters<typeof saveWriteUp>[0];

async function writeNote(intent: string, target: Target, form: FormData, now: Date): Promise<Result> {
  const parsed = writeUpSchema.safeParse(formObject(form, ['photos']));
  if (!parsed.success) return { outcome: refuseFields(fieldErrors(parsed.error)), said: '' };
  const input = parsed.data;
  if (intent === 'save') return { outcome: await saveWriteUp(target, input, now), said: 'Draft saved.' };
  if (intent === 'submit') {
    const saved = await saveWriteUp(target, input, now);
    return saved.ok
      ? { outcome: await submitWriteUp(target, now), said: 'Sent to review.' }
      : { outcome: saved, said: '' };
  }
  const override = intent === 'publish' ? String(form.get('override') ?? '').trim() : '';
  if (intent === 'publish' && override === '') {
    return { outcome: refuseFields({ override: 'Write why it is published all the same.' }), said: '' };
  }
  const published = await publishWriteUp(target, { input, override: override.slice(0, 5000) }, now);
  return {
    outcome: published,
    said: 'Published.',
    to: published.ok ? `/write-ups/${published.value.slug}` : undefined,
  };
}
