import type { Transaction } from 'sequelize';
import { lackingForCause, lackingForCure } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { slugOf } from '#app/domain/text/slug.ts';
import { nextWriteUpState } from '#app/domain/write-ups/write-up-state.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { caseRecord, loadEvidence } from '#app/features/cases/evidence.server.ts';
import { settleCase } from '#app/features/cases/settle.server.ts';
import { done, Forbidden, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import {
  AuditEntry,
  type Case,
  GateOverride,
  Photo,
  WriteUp,
  WriteUpFlag,
  WriteUpRemark,
  WriteUpRevision,
} from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import type { WriteUpInput } from './schema.ts';

type Target = { actor: Actor; number: number };

const PUBLISH_GATE = 'publish-write-up';
const PUBLISH_RULE = 'A note is published only with evidence for the cause and proof of the cure.';

/** Runs a change to a case's note: authorised, the case locked, written to the history, settled. */
async function changeNote<T>(
  { actor, number }: Target,
  needs: Action,
  action: string,
  detail: Record<string, unknown>,
  at: Date,
  change: (row: Case, note: WriteUp | null, transaction: Transaction) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  return transact(async (transaction) => {
    const row = await findCaseRow(actor, number, transaction);
    if (!may(actor.role, needs)) throw new Forbidden();
    const note = await WriteUp.findOne({
      where: { caseId: row.id },
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    const outcome = await change(row, note, transaction);
    if (!outcome.ok) return outcome;
    await recordAudit(
      { actor, action, subject: 'write-up', subjectId: row.id, caseId: row.id, detail, at },
      transaction,
    );
    await settleCase(row.id, transaction, at);
    return outcome;
  });
}

/** Saves the draft. A tech writes drafts and what was sent back; the lead also changes a note in review or in force. */
export async function saveWriteUp(target: Target, input: WriteUpInput, now: Date): Promise<Outcome> {
  const { actor } = target;
  return changeNote(
    target,
    'write-up:write',
    'note-saved',
    { title: input.title },
    now,
    async (row, note, transaction) => {
      const photoIds = await ownPhotos(row.id, input.photos, transaction);
      const values = { title: input.title, body: input.body, photoIds, updatedAt: now };
      if (!note) {
        await createNote(actor, row, input, now, transaction);
        return done();
      }
      if (input.version !== undefined && input.version !== note.version)
        return conflict(row, note, transaction);
      if (note.state === 'published')
        return refuseFields({ '': 'A published note changes only by publishing it again.' });
      if (!mayWrite(actor, note)) throw new Forbidden();
      await note.update({ ...values, version: note.version + 1 }, { transaction });
      return done();
    },
  );
}

async function createNote(
  actor: Actor,
  row: Case,
  { title, body, photos }: WriteUpInput,
  now: Date,
  transaction: Transaction,
): Promise<WriteUp> {
  return WriteUp.create(
    {
      title,
      body,
      photoIds: await ownPhotos(row.id, photos, transaction),
      shopId: row.shopId,
      caseId: row.id,
      slug: await freeSlug(row, title, transaction),
      state: 'draft',
      authorId: actor.userId,
      authorName: actor.name,
      createdAt: now,
      updatedAt: now,
    },
    { transaction },
  );
}

/** Whether the actor may change the note's text as it stands now. */
export function mayWrite(actor: Actor, note: Pick<WriteUp, 'state'>): boolean {
  if (may(actor.role, 'write-up:review')) return true;
  return may(actor.role, 'write-up:write') && (note.state === 'draft' || note.state === 'sent-back');
}

async function conflict(row: Case, note: WriteUp, transaction: Transaction) {
  const last = await AuditEntry.findOne({
    where: { caseId: row.id, subject: 'write-up' },
    order: [['id', 'DESC']],
    transaction,
  });
  return {
    ok: false as const,
    refused: 'conflict' as const,
    byName: last?.byName ?? note.authorName,
    at: note.updatedAt.toISOString(),
    theirs: { title: note.title, body: note.body },
    version: note.version,
  };
}

async function ownPhotos(caseId: number, ids: number[], transaction: Transaction): Promise<number[]> {
  const rows = await Photo.findAll({
    where: { id: ids, caseId, deletedAt: null },
    attributes: ['id'],
    transaction,
  });
  const own = new Set(rows.map(({ id }) => id));
  return ids.filter((id) => own.has(id));
}

async function freeSlug(row: Case, title: string, transaction: Transaction): Promise<string> {
  const slug = `${slugOf(title, 80) || 'note'}-${row.number}`;
  const taken = await WriteUp.count({ where: { shopId: row.shopId, slug }, transaction });
  return taken ? `${slug}-${row.id}` : slug;
}

export async function submitWriteUp(target: Target, now: Date): Promise<Outcome> {
  return changeNote(target, 'write-up:write', 'note-submitted', {}, now, async (_row, note, transaction) => {
    const state = note && nextWriteUpState(note.state, 'submit');
    if (!note || !state) return refuseFields({ '': 'Only a draft can go to review.' });
    await note.update({ state, updatedAt: now, version: note.version + 1 }, { transaction });
    return done();
  });
}

export async function sendBackWriteUp(target: Target, remark: string, now: Date): Promise<Outcome> {
  const { actor } = target;
  return changeNote(
    target,
    'write-up:review',
    'note-sent-back',
    { remark },
    now,
    async (row, note, transaction) => {
      const state = note && nextWriteUpState(note.state, 'send-back');
      if (!note || !state) return refuseFields({ '': 'Only a note in review can be sent back.' });
      await note.update({ state, updatedAt: now, version: note.version + 1 }, { transaction });
      await WriteUpRemark.create(
        {
          shopId: row.shopId,
          writeUpId: note.id,
          body: remark,
          at: now,
          byId: actor.userId,
          byName: actor.name,
        },
        { transaction },
      );
      return done();
    },
  );
}

type Publish = { input: WriteUpInput | null; override: string };

/**
 * Publishes the note, or a new revision of one in force. Refused without evidence for the cause or proof of the cure,
 * unless the lead overrides with a written reason, which stays on the record.
 */
export async function publishWriteUp(
  target: Target,
  { input, override }: Publish,
  now: Date,
): Promise<Outcome<{ slug: string }>> {
  const { actor } = target;
  const detail: Record<string, unknown> = {};
  return changeNote<{ slug: string }>(
    target,
    'write-up:review',
    'note-published',
    detail,
    now,
    async (row, found, transaction) => {
      if (!found && !input) return refuseFields({ '': 'Write the note first.' });
      const state = found ? nextWriteUpState(found.state, 'publish') : 'published';
      if (!state) return refuseFields({ '': 'This note cannot be published as it stands.' });
      if (found && input?.version !== undefined && input.version !== found.version) {
        return conflict(row, found, transaction);
      }
      const record = caseRecord(row, await loadEvidence(row.id, transaction));
      const lacks = [...lackingForCause(record), ...lackingForCure(record)];
      if (lacks.length > 0) {
        const refused = await passGate({ actor, row, lacks, override, now }, transaction);
        if (refused) return refused;
        detail.override = override;
      }
      const note = found ?? (await createNote(actor, row, input as WriteUpInput, now, transaction));
      const photoIds = input ? await ownPhotos(row.id, input.photos, transaction) : note.photoIds;
      const text = { title: input?.title ?? note.title, body: input?.body ?? note.body, photoIds };
      await note.update(
        {
          ...text,
          state,
          publishedAt: now,
          updatedAt: now,
          withdrawnReason: null,
          version: note.version + 1,
        },
        { transaction },
      );
      const number = 1 + (await WriteUpRevision.count({ where: { writeUpId: note.id }, transaction }));
      await WriteUpRevision.create(
        {
          ...text,
          shopId: row.shopId,
          writeUpId: note.id,
          number,
          publishedAt: now,
          byId: actor.userId,
          byName: actor.name,
        },
        { transaction },
      );
      detail.revision = number;
      return done({ slug: note.slug });
    },
  );
}

type Gate = { actor: Actor; row: Case; lacks: string[]; override: string; now: Date };

async function passGate({ actor, row, lacks, override, now }: Gate, transaction: Transaction) {
  if (override === '')
    return { ok: false as const, refused: 'gate' as const, gate: PUBLISH_GATE, lacks, rule: PUBLISH_RULE };
  if (!may(actor.role, 'gate:override')) throw new Forbidden();
  await GateOverride.create(
    {
      shopId: row.shopId,
      caseId: row.id,
      gate: PUBLISH_GATE,
      lacks,
      reason: override,
      at: now,
      byId: actor.userId,
      byName: actor.name,
    },
    { transaction },
  );
  return null;
}

export async function withdrawWriteUp(target: Target, reason: string, now: Date): Promise<Outcome> {
  return changeNote(
    target,
    'write-up:review',
    'note-withdrawn',
    { reason },
    now,
    async (_row, note, transaction) => {
      const state = note && nextWriteUpState(note.state, 'withdraw');
      if (!note || !state) return refuseFields({ '': 'Only a published note can be withdrawn.' });
      const withdrawnReason = reason.slice(0, 190);
      await note.update(
        { state, withdrawnReason, updatedAt: now, version: note.version + 1 },
        { transaction },
      );
      return done();
    },
  );
}

/** Anyone signed in can point out an error in a published note. */
export async function flagWriteUp(target: Target, words: string, now: Date): Promise<Outcome> {
  const { actor } = target;
  return changeNote(
    target,
    'write-up:flag',
    'note-flagged',
    { words },
    now,
    async (row, note, transaction) => {
      if (note?.state !== 'published') return refuseFields({ '': 'Only a published note can be flagged.' });
      await WriteUpFlag.create(
        {
          shopId: row.shopId,
          writeUpId: note.id,
          body: words,
          at: now,
          byId: actor.userId,
          byName: actor.name,
        },
        { transaction },
      );
      return done();
    },
  );
}

export async function answerFlag(
  target: Target,
  flagId: number,
  answer: string,
  now: Date,
): Promise<Outcome> {
  const { actor } = target;
  return changeNote(
    target,
    'write-up:review',
    'flag-answered',
    { answer },
    now,
    async (_row, note, transaction) => {
      const flag =
        note && (await WriteUpFlag.findOne({ where: { id: flagId, writeUpId: note.id }, transaction }));
      if (!flag) throw new NotFound();
      await flag.update(
        { answer, answeredAt: now, answeredById: actor.userId, answeredByName: actor.name },
        { transaction },
      );
      return done();
    },
  );
}
