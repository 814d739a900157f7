import { provedTight } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { entry } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { done, Forbidden, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { type Case, CaseSymptom, Circuit, Comment, Machine, SameOnMine, User } from '#db/models/index.ts';
import { changeCase } from './change-case.server.ts';
import { caseRecord, loadEvidence } from './evidence.server.ts';
import { ambientColumns, setSymptoms } from './open-case.server.ts';
import type { ComplaintInput, NotedLink } from './schema.ts';

type Target = { actor: Actor; number: number };

export async function saveComplaint({ actor, number }: Target, input: ComplaintInput): Promise<Outcome> {
  const vocabulary = await shopVocabulary(actor.shopId);
  return changeCase({
    actor,
    number,
    needs: 'case:edit',
    link: 'complaint',
    version: input.version,
    present: async (row, transaction) => {
      const symptoms = await CaseSymptom.findAll({ where: { caseId: row.id }, transaction });
      return {
        complaint: row.complaint,
        symptoms: symptoms.map(({ symptomId }) => symptomId).join(', '),
        weather: row.weather,
        ambient: `${row.ambientEntered} ${row.ambientUnit}`.trim(),
        hours: row.hours === null ? '' : String(row.hours),
      };
    },
    audit: { action: 'complaint-saved', detail: { complaint: input.complaint, symptoms: input.symptoms } },
    async change(row, transaction) {
      if (input.symptoms.some((id) => !entry(vocabulary, 'symptom', id))) {
        return refuseFields({ symptoms: 'A symptom is not in the catalogue. Choose others.' });
      }
      if (input.circuitId && input.circuitId !== row.circuitId) {
        const circuit = await Circuit.findOne({
          where: { id: input.circuitId, machineId: row.machineId },
          transaction,
        });
        if (!circuit) return refuseFields({ circuitId: 'This machine has no such circuit. Choose another.' });
        row.set({ circuitId: circuit.id, medium: circuit.medium });
      }
      row.set({
        complaint: input.complaint,
        weather: input.weather,
        hours: input.hours,
        ...ambientColumns(input.ambient, input.ambientUnit),
      });
      await setSymptoms(row, input.symptoms, transaction);
      return done();
    },
  });
}

const NOTE_COLUMNS = {
  readings: 'readingsNote',
  trace: 'traceNote',
  repair: 'repairNote',
  proof: 'proofNote',
  charge: 'chargeNote',
} as const satisfies Record<NotedLink, keyof Case>;

/** The free words of a link, beside its entries. */
export async function saveNotes(
  target: Target,
  link: NotedLink,
  note: string,
  version?: number,
): Promise<Outcome> {
  const column = NOTE_COLUMNS[link];
  return changeCase({
    ...target,
    needs: 'case:edit',
    link,
    version,
    present: (row) => ({ note: row[column] }),
    audit: { action: 'notes-saved', detail: { note } },
    async change(row) {
      row.set(column, note);
      return done();
    },
  });
}

export async function parkCase(
  target: Target,
  { reason, until }: { reason: string; until: string },
): Promise<Outcome> {
  return changeCase({
    ...target,
    needs: 'case:park',
    audit: { action: 'parked', detail: { reason, until } },
    async change(row) {
      row.set({ parkedReason: reason, parkedUntil: new Date(`${until}T00:00:00Z`) });
      return done();
    },
  });
}

export async function resumeCase({ actor, number }: Target): Promise<Outcome> {
  return changeCase({
    actor,
    number,
    needs: 'case:park',
    audit: { action: 'resumed' },
    async change(row) {
      if (row.closedReason !== null && actor.role !== 'lead') throw new Forbidden();
      row.set({ parkedReason: null, parkedUntil: null, closedReason: null });
      return done();
    },
  });
}

export async function closeUnsolved(target: Target, reason: string): Promise<Outcome> {
  return changeCase({
    ...target,
    needs: 'case:close-unsolved',
    audit: { action: 'closed-unsolved', detail: { reason } },
    async change(row) {
      row.set({ closedReason: reason, parkedReason: null, parkedUntil: null });
      return done();
    },
  });
}

export async function assignCase(target: Target, assigneeId: number | null): Promise<Outcome> {
  const detail: Record<string, unknown> = {};
  return changeCase({
    ...target,
    needs: 'case:assign',
    audit: { action: 'assigned', detail },
    async change(row, transaction) {
      const where = { id: assigneeId ?? 0, shopId: row.shopId, active: true };
      const person = assigneeId === null ? null : await User.findOne({ where, transaction });
      if (assigneeId !== null && !person) return refuseFields({ assignee: 'Choose somebody of this shop.' });
      detail.to = person?.name ?? 'nobody';
      row.set({ assigneeId });
      return done();
    },
  });
}

/** The machine goes back to work; only a circuit proved tight may. */
export async function returnToWork(target: Target, back: boolean, now: Date): Promise<Outcome> {
  return changeCase({
    ...target,
    needs: 'case:edit',
    audit: { action: back ? 'back-to-work' : 'taken-off-work' },
    at: now,
    async change(row, transaction) {
      if (back && !provedTight(caseRecord(row, await loadEvidence(row.id, transaction)))) {
        return refuseFields({ '': 'The newest proof does not say tight, so the machine stays here.' });
      }
      const hours = (now.getTime() - row.openedAt.getTime()) / 3_600_000;
      row.set(
        back
          ? { backToWorkAt: now, downtimeHours: Math.round(hours * 10) / 10 }
          : { backToWorkAt: null, downtimeHours: null },
      );
      return done();
    },
  });
}

export async function addComment({ actor, number }: Target, body: string, now: Date): Promise<Outcome> {
  return changeCase({
    actor,
    number,
    needs: 'case:comment',
    audit: { action: 'commented' },
    at: now,
    async change(row, transaction) {
      await Comment.create(
        { shopId: row.shopId, caseId: row.id, byId: actor.userId, byName: actor.name, body, at: now },
        { transaction },
      );
      return done();
    },
  });
}

/** Takes a comment back: its author's, or any by the lead. */
export async function removeComment(
  { actor, number }: Target,
  commentId: number,
  now: Date,
): Promise<Outcome> {
  return changeCase({
    actor,
    number,
    needs: 'case:comment',
    audit: { action: 'comment-removed', detail: { commentId } },
    async change(row, transaction) {
      const comment = await Comment.findOne({
        where: { id: commentId, caseId: row.id, deletedAt: null },
        transaction,
      });
      if (!comment) throw new NotFound();
      if (comment.byId !== actor.userId && actor.role !== 'lead') throw new Forbidden();
      await comment.update({ deletedAt: now }, { transaction });
      return done();
    },
  });
}

type SameOnMineInput = { machine: string; note: string };

/** "Same on mine", with the machine it was on; said again for the same machine it replaces the note. */
export async function saySameOnMine(
  { actor, number }: Target,
  { machine, note }: SameOnMineInput,
  now: Date,
): Promise<Outcome> {
  return changeCase({
    actor,
    number,
    needs: 'case:same-on-mine',
    audit: { action: 'same-on-mine', detail: { machine, note } },
    at: now,
    async change(row, transaction) {
      const found = await Machine.findOne({ where: { shopId: row.shopId, number: machine }, transaction });
      if (!found) return refuseFields({ machine: 'No machine of this shop has this number.' });
      if (found.id === row.machineId)
        return refuseFields({ machine: 'This case is about that machine itself.' });
      const values = { note, byId: actor.userId, byName: actor.name, at: now };
      const where = { caseId: row.id, machineId: found.id };
      const before = await SameOnMine.findOne({ where, transaction });
      if (before) await before.update(values, { transaction });
      else await SameOnMine.create({ shopId: row.shopId, ...where, ...values }, { transaction });
      return done();
    },
  });
}
