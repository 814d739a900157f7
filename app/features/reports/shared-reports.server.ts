import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { findCaseRow } from '#app/features/cases/change-case.server.ts';
import { Forbidden } from '#app/features/outcome.ts';
import { env } from '#app/server/env.server.ts';
import { hashToken, randomToken } from '#app/server/tokens.server.ts';
import { Case, SharedReport } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';

const DAYS = [7, 30, 90];
const DAY_MS = 24 * 60 * 60_000;

/** Makes an expiring link to a case's report; the link is answered once and never again. */
export async function createSharedReport(
  actor: Actor,
  number: number,
  form: FormData,
  now: Date,
): Promise<string> {
  if (!may(actor.role, 'case:share')) throw new Forbidden();
  const asked = Number(form.get('days'));
  const days = DAYS.includes(asked) ? asked : 7;
  const token = randomToken();
  const expiresAt = new Date(now.getTime() + days * DAY_MS);
  await transact(async (transaction) => {
    const row = await findCaseRow(actor, number, transaction);
    await SharedReport.create(
      {
        shopId: row.shopId,
        caseId: row.id,
        tokenHash: hashToken(token),
        createdById: actor.userId,
        createdAt: now,
        expiresAt,
      },
      { transaction },
    );
    const detail = { until: expiresAt.toISOString().slice(0, 10) };
    await recordAudit(
      { actor, action: 'report-shared', subject: 'case', subjectId: row.id, caseId: row.id, detail },
      transaction,
    );
  });
  return new URL(`/r/${token}`, env.PUBLIC_URL).href;
}

/** The case and shop that a link in force stands for, or null. */
export async function findSharedReport(token: string, now: Date) {
  const row = await SharedReport.findOne({ where: { tokenHash: hashToken(token), revokedAt: null } });
  if (!row || row.expiresAt <= now) return null;
  const shared = await Case.findByPk(row.caseId, { rejectOnEmpty: true });
  return { shopId: row.shopId, number: shared.number, expiresAt: row.expiresAt };
}
