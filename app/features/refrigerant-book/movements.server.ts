import { QueryTypes, type Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { refrigerantNamed } from '#app/domain/refrigerant/saturation.ts';
import {
  accountsOf,
  cylinderAccount,
  type MovementKind,
  weighing,
} from '#app/domain/refrigerant-book/book.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { done, type FieldErrors, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { sequelize } from '#db/connection.server.ts';
import { type Circuit, Cylinder, Movement } from '#db/models/index.ts';

export type MovementEntry = {
  actor: Actor;
  kind: MovementKind;
  cylinderId: number;
  /** Grams moved; for a weighing, what the scale shows. */
  grams: number;
  circuit: Circuit | null;
  caseId?: number | null;
  chargeId?: number | null;
  certificate?: string;
  note?: string;
  at: Date;
};

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
export async function lockCylinder(
  shopId: number,
  cylinderId: number,
  transaction: Transaction,
): Promise<Cylinder | null> {
  return Cylinder.findOne({ where: { id: cylinderId, shopId }, transaction, lock: transaction.LOCK.UPDATE });
}

/** Why this cylinder and this circuit do not go together; mixed refrigerant can be neither used nor reclaimed. */
function mixes(cylinder: Cylinder, circuit: Circuit | null): FieldErrors | null {
  const plate = circuit && refrigerantNamed(circuit.refrigerant);
  if (!plate || plate === cylinder.refrigerant) return null;
  return {
    cylinder: `${cylinder.label} is for ${cylinder.refrigerant}, the circuit’s plate says ${plate}. They must not be mixed.`,
  };
}

/**
 * Writes a movement inside the caller's transaction. A cylinder never gives more than it holds, and refrigerants are
 * never mixed; refusals stand beside `cylinder` and `amount`.
 */
export async function writeMovement(
  entry: MovementEntry,
  transaction: Transaction,
): Promise<Outcome<{ id: number }>> {
  const { actor, kind, circuit, at } = entry;
  const { shopId } = actor;
  const cylinder = await lockCylinder(shopId, entry.cylinderId, transaction);
  if (!cylinder) return refuseFields({ cylinder: 'Choose a cylinder of this shop.' });
  const mixed = mixes(cylinder, circuit);
  if (mixed) return refuseFields(mixed);
  const account = cylinderAccount(cylinder.id);
  const held = await heldBy(shopId, account, transaction);
  const { from, to, grams } =
    kind === 'weighed'
      ? weighing(cylinder.id, held, entry.grams)
      : { ...accountsOf(kind, cylinder.id, circuit?.id ?? null), grams: kind === 'opened' ? 0 : entry.grams };
  if (from === account && held < grams) {
    return refuseFields({ amount: `${cylinder.label} holds ${held.toLocaleString('en-GB')} g only.` });
  }
  const movement = await Movement.create(
    {
      shopId,
      kind,
      refrigerant: cylinder.refrigerant,
      grams,
      weighedGrams: kind === 'weighed' ? entry.grams : null,
      fromAccount: from,
      toAccount: to,
      cylinderId: cylinder.id,
      circuitId: circuit?.id ?? null,
      machineId: circuit?.machineId ?? null,
      caseId: entry.caseId ?? null,
      chargeId: entry.chargeId ?? null,
      certificate: entry.certificate ?? '',
      note: entry.note ?? '',
      at,
      byId: actor.userId,
      byName: actor.name,
    },
    { transaction },
  );
  await recordAudit(
    {
      actor,
      action: 'movement-entered',
      subject: 'book',
      subjectId: movement.id,
      caseId: entry.caseId,
      detail: { kind, grams, cylinder: cylinder.label },
      at,
    },
    transaction,
  );
  return done({ id: movement.id });
}

type Reversal = { actor: Actor; movement: Movement; note: string; at: Date };

/** Takes a movement back by a mirrored one, once, inside the caller's transaction. */
export async function writeReversal(
  { actor, movement, note, at }: Reversal,
  transaction: Transaction,
): Promise<Outcome> {
  const { shopId } = actor;
  if (movement.cylinderId !== null) await lockCylinder(shopId, movement.cylinderId, transaction);
  if (movement.reversesId !== null) {
    return refuseFields({ '': 'A reversal is not reversed: enter the movement again.' });
  }
  if (await Movement.count({ where: { reversesId: movement.id }, transaction })) {
    return refuseFields({ '': 'This movement has been reversed already.' });
  }
  const { kind, refrigerant, grams, fromAccount, toAccount, cylinderId, machineId, circuitId, caseId } =
    movement;
  if (toAccount.startsWith('cylinder:') && (await heldBy(shopId, toAccount, transaction)) < grams) {
    return refuseFields({ '': 'The cylinder no longer holds what this would take out of it.' });
  }
  const reversal = await Movement.create(
    {
      ...{ kind, refrigerant, grams, cylinderId, machineId, circuitId, caseId },
      shopId,
      fromAccount: toAccount,
      toAccount: fromAccount,
      note,
      reversesId: movement.id,
      at,
      byId: actor.userId,
      byName: actor.name,
    },
    { transaction },
  );
  await recordAudit(
    {
      actor,
      action: 'movement-reversed',
      subject: 'book',
      subjectId: reversal.id,
      caseId,
      detail: { reverses: movement.id, note },
      at,
    },
    transaction,
  );
  return done();
}

/** The movement of a charge entry that still stands. */
export async function movementOfCharge(chargeId: number, transaction: Transaction): Promise<Movement | null> {
  const movements = await Movement.findAll({ where: { chargeId }, order: [['id', 'DESC']], transaction });
  for (const movement of movements) {
    if (!(await Movement.count({ where: { reversesId: movement.id }, transaction }))) return movement;
  }
  return null;
}
