import { data } from 'react-router';
import { judgeLikeness } from '#app/features/find/alike.server.ts';
import { createSharedReport } from '#app/features/reports/shared-reports.server.ts';
import type { Viewer } from '#app/server/context.ts';
import { orRefuse } from '#app/server/guards.server.ts';
import { redirectWithToast } from '#app/server/redirects.server.ts';
import { fieldErrors, formObject, typedValues } from '../form-fields.ts';
import { done, type Outcome, type Refusal, refuseFields } from '../outcome.ts';
import { requireOnCase } from './change-case.server.ts';
import {
  addComment,
  assignCase,
  closeUnsolved,
  parkCase,
  removeComment,
  resumeCase,
  returnToWork,
  saySameOnMine,
} from './commands.server.ts';
import { closeSchema, commentSchema, parkSchema, sameOnMineSchema } from './schema.ts';

type Done = { outcome: Outcome<unknown>; said: string };

/** The action of a case's first page: talk, likenesses, and where the case stands. */
export async function overviewAction(viewer: Viewer, number: number, form: FormData) {
  const intent = String(form.get('intent') ?? '');
  await orRefuse(requireOnCase(viewer, number, 'shop:read'));
  if (intent === 'share') {
    const link = await orRefuse(createSharedReport(viewer, number, form, new Date()));
    return data({
      form: intent,
      refusal: { refused: 'fields', fields: {} } as Refusal,
      typed: {} as Record<string, string>,
      link,
    });
  }
  const { outcome, said } = await orRefuse(run(intent, viewer, number, form));
  if (outcome.ok) return redirectWithToast(`/cases/${number}`, said);
  const { ok: _ok, ...refusal } = outcome;
  return data(
    { form: intent, refusal: refusal as Refusal, typed: typedValues(form), link: null },
    { status: 400 },
  );
}

async function run(intent: string, viewer: Viewer, number: number, form: FormData): Promise<Done> {
  const target = { actor: viewer, number };
  const now = new Date();
  const input = formObject(form);
  switch (intent) {
    case 'comment': {
      const parsed = commentSchema.safeParse(input);
      if (!parsed.success) return refused(parsed.error);
      return { outcome: await addComment(target, parsed.data.body, now), said: 'Comment added.' };
    }
    case 'remove-comment':
      return {
        outcome: await removeComment(target, Number(input.commentId) || 0, now),
        said: 'Comment taken back.',
      };
    case 'same-on-mine': {
      const parsed = sameOnMineSchema.safeParse(input);
      if (!parsed.success) return refused(parsed.error);
      return { outcome: await saySameOnMine(target, parsed.data, now), said: 'Noted: the same on yours.' };
    }
    case 'judge': {
      const verdict = input.verdict === 'confirmed' || input.verdict === 'dismissed' ? input.verdict : null;
      await judgeLikeness({ actor: viewer, number, otherNumber: Number(input.other) || 0, verdict }, now);
      const said =
        verdict === null ? 'Taken back.' : verdict === 'confirmed' ? 'Confirmed as alike.' : 'Dismissed.';
      return { outcome: done(), said };
    }
    case 'park': {
      const parsed = parkSchema.safeParse(input);
      if (!parsed.success) return refused(parsed.error);
      return { outcome: await parkCase(target, parsed.data), said: 'Case parked.' };
    }
    case 'resume':
      return { outcome: await resumeCase(target), said: 'Case taken up again.' };
    case 'close': {
      const parsed = closeSchema.safeParse(input);
      if (!parsed.success) return refused(parsed.error);
      return { outcome: await closeUnsolved(target, parsed.data.reason), said: 'Case closed unsolved.' };
    }
    case 'assign': {
      const assigneeId = Number(input.assignee) || null;
      return { outcome: await assignCase(target, assigneeId), said: 'Case handed over.' };
    }
    case 'back-to-work': {
      const back = input.back === 'yes';
      return {
        outcome: await returnToWork(target, back, now),
        said: back ? 'Back to work.' : 'Taken off work.',
      };
    }
    default:
      throw data(null, { status: 400 });
  }
}

function refused(error: Parameters<typeof fieldErrors>[0]): Done {
  return { outcome: refuseFields(fieldErrors(error)), said: '' };
}
