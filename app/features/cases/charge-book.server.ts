import type { Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { isUnit, UNITS } from '#app/domain/units/units.ts';
import { done, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { certificateOf } from '#app/features/people/certificates.server.ts';
import {
  movementOfCharge,
  writeMovement,
  writeReversal,
} from '#app/features/refrigerant-book/movements.server.ts';
import { type Case, type Charge, Circuit } from '#db/models/index.ts';

type Enter = { actor: Actor; row: Case; charge: Charge; at: Date };

/** The movement that a charge entry with a cylinder of the book stands for; refusals stand beside the entry's fields. */
export async function enterInBook(
  { actor, row, charge, at }: Enter,
  transaction: Transaction,
): Promise<Outcome<unknown>> {
  const { kind, cylinderId, unit, amountSi } = charge;
  if (cylinderId === null || kind === 'not-needed') return done();
  if (row.medium !== 'refrigerant') {
    return refuseFields({ cylinder: 'The book is for refrigerant. Write the container in words.' });
  }
  const grams = Math.round(amountSi * 1000);
  if (!isUnit(unit) || UNITS[unit].quantity !== 'mass' || grams < 1) {
    return refuseFields({ value: 'The book needs a weight of at least 1 g.' });
  }
  const written = await writeMovement(
    {
      actor,
      kind,
      cylinderId,
      grams,
      circuit: await Circuit.findByPk(row.circuitId, { transaction, rejectOnEmpty: true }),
      caseId: row.id,
      chargeId: charge.id,
      certificate: await certificateOf(actor, at, transaction),
      at,
    },
    transaction,
  );
  if (written.ok || written.refused !== 'fields') return written;
  const { amount, ...fields } = written.fields;
  return refuseFields(amount === undefined ? fields : { ...fields, value: amount });
}

/** Reverses what a charge entry stands for, before the entry is changed or removed. */
export async function takeOutOfBook(
  { actor, row, charge, at }: Enter,
  transaction: Transaction,
): Promise<Outcome> {
  const movement = await movementOfCharge(charge.id, transaction);
  if (!movement) return done();
  const note = `The charge entry of case ${row.number} was changed or removed.`;
  return writeReversal({ actor, movement, note, at }, transaction);
}
