import type { Transaction } from 'sequelize';
import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { Forbidden, NotFound, type Outcome, type Refusal } from '#app/features/outcome.ts';
import { AuditEntry, Case } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { settleCase } from './settle.server.ts';

type Change<T> = {
  actor: Actor;
  number: number;
  needs: Action;
  /** The link whose version the change is checked against and raises. */
  link?: LinkKey;
  /** The version the person had before them; undefined when the change cannot overwrite anything. */
  version?: number;
  /** The link's present values, shown to the person who came second. */
  present?: (row: Case, transaction: Transaction) => Promise<Record<string, string>> | Record<string, string>;
  audit: { action: string; detail?: Record<string, unknown> };
  /** When it happened; now, unless an older record is entered. */
  at?: Date;
  change: (row: Case, transaction: Transaction) => Promise<Outcome<T>>;
};

/** The case of the actor's shop; another shop's does not exist. */
export async function findCaseRow(actor: Actor, number: number, transaction?: Transaction): Promise<Case> {
  const lock = transaction?.LOCK.UPDATE;
  const row = await Case.findOne({ where: { shopId: actor.shopId, number }, transaction, lock });
  if (!row) throw new NotFound();
  return row;
}

/** Turns away whoever may not do `needs` on this case, before anything they sent is looked at. */
export async function requireOnCase(actor: Actor, number: number, needs: Action): Promise<void> {
  await findCaseRow(actor, number);
  if (!may(actor.role, needs)) throw new Forbidden();
}

/** Carries a refusal out of the transaction, so that nothing of a refused change stays. */
class Refused extends Error {
  constructor(readonly refusal: { ok: false } & Refusal) {
    super('refused');
  }
}

/**
 * The one way in which a case changes: authorised, locked, checked against what the person saw, written to the history,
 * settled; a refused change leaves nothing behind.
 */
export async function changeCase<T>(options: Change<T>): Promise<Outcome<T>> {
  try {
    return await transact((transaction) => changeWithin(options, transaction));
  } catch (error) {
    if (error instanceof Refused) return error.refusal;
    throw error;
  }
}

async function changeWithin<T>(options: Change<T>, transaction: Transaction): Promise<Outcome<T>> {
  const { actor, number, needs, link, version, present, audit, at = new Date(), change } = options;
  const row = await findCaseRow(actor, number, transaction);
  if (!may(actor.role, needs)) throw new Forbidden();
  if (link && version !== undefined && version !== (row.versions[link] ?? 1)) {
    return conflict(row, link, (await present?.(row, transaction)) ?? {}, transaction);
  }
  const outcome = await change(row, transaction);
  if (!outcome.ok) throw new Refused(outcome);
  if (link) row.versions = { ...row.versions, [link]: (row.versions[link] ?? 1) + 1 };
  await row.save({ transaction });
  const detail = { ...(link ? { link } : {}), ...audit.detail };
  await recordAudit(
    { actor, action: audit.action, subject: link ?? 'case', subjectId: row.id, caseId: row.id, detail, at },
    transaction,
  );
  await settleCase(row.id, transaction, at);
  return outcome;
}

async function conflict(row: Case, link: LinkKey, theirs: Record<string, string>, transaction: Transaction) {
  const last = await AuditEntry.findOne({
    where: { caseId: row.id, subject: link },
    order: [['id', 'DESC']],
    transaction,
  });
  return {
    ok: false as const,
    refused: 'conflict' as const,
    byName: last?.byName ?? 'Somebody',
    at: (last?.at ?? row.updatedAt).toISOString(),
    theirs,
    version: row.versions[link] ?? 1,
  };
}
