import type { Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { AuditEntry } from '#db/models/index.ts';

type Entry = {
  actor: Actor;
  action: string;
  subject: string;
  subjectId?: number | null;
  caseId?: number | null;
  detail?: Record<string, unknown>;
  at?: Date;
};

/** Writes who did what, inside the transaction of the change itself. */
export async function recordAudit(entry: Entry, transaction: Transaction): Promise<void> {
  const { actor, action, subject, subjectId = null, caseId = null, detail = {}, at = new Date() } = entry;
  await AuditEntry.create(
    {
      shopId: actor.shopId,
      caseId,
      subject,
      subjectId,
      action,
      detail,
      byId: actor.userId || null,
      byName: actor.name,
      at,
    },
    { transaction },
  );
}
