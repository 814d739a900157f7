import { QueryTypes, type Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import {
  accountsOf,
  type CylinderKind,
  cylinderAccount,
  NEEDS_MACHINE,
} from '#app/domain/refrigerant-book/book.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { done, Forbidden, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { sequelize } from '#db/connection.server.ts';
import { Case, Cylinder, Machine, Movement } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { gramsOf, type MovementInput } from './schema.ts';

function requireMay(actor: Actor, action: Action): void {
  if (!may(actor.role, action)) throw new Forbidden();
}

type NewCylinder = { label: string; refrigerant: string; kind: CylinderKind };

export async function addCylinder(
  actor: Actor,
  input: NewCylinder,
  now: Date,
): Promise<Outcome<{ id: number }>> {
  requireMay(actor, 'book:write');
  return transact(async (transaction) => {
    const where = { shopId: actor.shopId, label: input.label };
    if (await Cylinder.count({ where, transaction }))
      return refuseFields({ label: 'Another cylinder has this number.' });
    const cylinder = await Cylinder.create(
      { ...input, shopId: actor.shopId, createdAt: now },
      { transaction },
    );
    await recordAudit(
      { actor, action: 'cylinder-added', subject: 'cylinder', subjectId: cylinder.id, detail: { ...input } },
      transaction,
    );
    return done({ id: cylinder.id });
  });
}

/** What an account holds, in grams, read inside the transaction that holds its cylinder's lock. */
async function heldBy(shopId: number, account: string, transaction: Transaction): Promise<number> {
  const [row] = await sequelize.query<{ held: number | null }>(
    `SELECT COALESCE(SUM(IF(toAccount = :account, grams, 0)), 0) - COALESCE(SUM(IF(fromAccount = :account, grams, 0)), 0) AS held
       FROM movements WHERE shopId = :shopId AND (toAccount = :account OR fromAccount = :account)`,
    { replacements: { shopId, account }, type: QueryTypes.SELECT, transaction },
  );
  return Number(row?.held ?? 0);
}

/** The cylinder, locked, so that two people who draw from it at once come one after the other. */
async function lockCylinder(
  shopId: number,
  cylinderId: number,
  transaction: Transaction,
): Promise<Cylinder | null> {
  return Cylinder.findOne({ where: { id: cylinderId, shopId }, transaction, lock: transaction.LOCK.UPDATE });
}

/** Enters a movement. A cylinder never gives more than it holds. */
export async function addMovement(
  actor: Actor,
  input: MovementInput,
  now: Date,
): Promise<Outcome<{ id: number }>> {
  requireMay(actor, 'book:write');
  const { shopId } = actor;
  return transact(async (transaction) => {
    const cylinder = await lockCylinder(shopId, input.cylinder, transaction);
    if (!cylinder) return refuseFields({ cylinder: 'Choose a cylinder of this shop.' });
    const machine = NEEDS_MACHINE[input.kind]
      ? await Machine.findOne({ where: { shopId, number: input.machine }, transaction })
      : null;
    if (NEEDS_MACHINE[input.kind] && !machine)
      return refuseFields({ machine: 'No machine of this shop has this number.' });
    const number = Number(input.caseNumber || 0);
    const row = number ? await Case.findOne({ where: { shopId, number }, transaction }) : null;
    if (number && !row) return refuseFields({ caseNumber: 'There is no such case.' });
    if (row && machine && row.machineId !== machine.id)
      return refuseFields({ caseNumber: 'That case is about another machine.' });
    const grams = gramsOf(input.amount, input.unit);
    const { from, to } = accountsOf(input.kind, cylinder.id, machine?.id ?? null);
    if (from === cylinderAccount(cylinder.id)) {
      const held = await heldBy(shopId, from, transaction);
      if (held < grams)
        return refuseFields({ amount: `${cylinder.label} holds ${held.toLocaleString('en-GB')} g only.` });
    }
    const movement = await Movement.create(
      {
        shopId,
        kind: input.kind,
        refrigerant: cylinder.refrigerant,
        grams,
        fromAccount: from,
        toAccount: to,
        cylinderId: cylinder.id,
        machineId: machine?.id ?? null,
        caseId: row?.id ?? null,
        certificate: input.certificate,
        note: input.note,
        at: now,
        byId: actor.userId,
        byName: actor.name,
      },
      { transaction },
    );
    const detail = { kind: input.kind, grams, cylinder: cylinder.label };
    await recordAudit(
      {
        actor,
        action: 'movement-entered',
        subject: 'book',
        subjectId: movement.id,
        caseId: row?.id,
        detail,
        at: now,
      },
      transaction,
    );
    return done({ id: movement.id });
  });
}

/** Takes a movement back by a mirrored one, once; it stays in the book with its reversal beside it. */
export async function reverseMovement(
  actor: Actor,
  movementId: number,
  note: string,
  now: Date,
): Promise<Outcome> {
  requireMay(actor, 'book:reverse');
  return transact(async (transaction) => {
    const movement = await Movement.findOne({ where: { id: movementId, shopId: actor.shopId }, transaction });
    if (!movement) throw new NotFound();
    if (movement.cylinderId !== null) await lockCylinder(actor.shopId, movement.cylinderId, transaction);
    if (movement.reversesId !== null)
      return refuseFields({ '': 'A reversal is not reversed: enter the movement again.' });
    if (await Movement.count({ where: { reversesId: movementId }, transaction })) {
      return refuseFields({ '': 'This movement has been reversed already.' });
    }
    const { kind, refrigerant, grams, fromAccount, toAccount, cylinderId, machineId, caseId } = movement;
    if (toAccount.startsWith('cylinder:') && (await heldBy(actor.shopId, toAccount, transaction)) < grams) {
      return refuseFields({ '': 'The cylinder no longer holds what this would take out of it.' });
    }
    const reversal = await Movement.create(
      {
        ...{ kind, refrigerant, grams, cylinderId, machineId, caseId },
        shopId: actor.shopId,
        fromAccount: toAccount,
        toAccount: fromAccount,
        note,
        reversesId: movementId,
        at: now,
        byId: actor.userId,
        byName: actor.name,
      },
      { transaction },
    );
    const detail = { reverses: movementId, note };
    await recordAudit(
      {
        actor,
        action: 'movement-reversed',
        subject: 'book',
        subjectId: reversal.id,
        caseId,
        detail,
        at: now,
      },
      transaction,
    );
    return done();
  });
}
