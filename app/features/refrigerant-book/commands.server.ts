import type { Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { type CylinderKind, NEEDS_MACHINE } from '#app/domain/refrigerant-book/book.ts';
import { circuitName, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import {
  done,
  type FieldErrors,
  Forbidden,
  NotFound,
  type Outcome,
  refuseFields,
} from '#app/features/outcome.ts';
import { Case, Circuit, Cylinder, Machine, Movement } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { writeMovement, writeReversal } from './movements.server.ts';
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

/** Enters a movement that no case's charge entry stands for: those enter the book by themselves. */
export async function addMovement(
  actor: Actor,
  input: MovementInput,
  now: Date,
): Promise<Outcome<{ id: number }>> {
  requireMay(actor, 'book:write');
  const vocabulary = await shopVocabulary(actor.shopId);
  return transact(async (transaction) => {
    const circuit = NEEDS_MACHINE[input.kind]
      ? await namedCircuit(actor, input, vocabulary, transaction)
      : null;
    if (circuit && !(circuit instanceof Circuit)) return refuseFields(circuit);
    const { kind, cylinder, certificate, note } = input;
    const grams = gramsOf(input.amount, input.unit);
    return writeMovement(
      { actor, kind, cylinderId: cylinder, grams, circuit, certificate, note, at: now },
      transaction,
    );
  });
}

/** The machine's circuit by its name, or its only one for refrigerant; not one with an open case on it. */
async function namedCircuit(
  actor: Actor,
  { machine: machineNumber, circuit: name }: MovementInput,
  vocabulary: Vocabulary,
  transaction: Transaction,
): Promise<Circuit | FieldErrors> {
  const { shopId } = actor;
  const machine = await Machine.findOne({ where: { shopId, number: machineNumber }, transaction });
  if (!machine) return { machine: 'No machine of this shop has this number.' };
  const circuits = await Circuit.findAll({
    where: { machineId: machine.id, medium: 'refrigerant' },
    order: [['id', 'ASC']],
    transaction,
  });
  const wanted = name.toLowerCase();
  const chosen =
    wanted === '' && circuits.length === 1
      ? circuits[0]
      : circuits.find((circuit) => circuitName(vocabulary, circuit).toLowerCase() === wanted);
  if (!chosen) {
    return circuits.length === 0
      ? { machine: 'This machine has no refrigerant circuit. Add it on the machine’s page.' }
      : {
          circuit: `Which circuit: ${circuits.map((circuit) => circuitName(vocabulary, circuit)).join(' or ')}?`,
        };
  }
  const open = await Case.findOne({
    where: { circuitId: chosen.id, state: ['open', 'leak-found', 'repaired', 'proved-tight', 'parked'] },
    order: [['number', 'DESC']],
    transaction,
  });
  return open
    ? { machine: `Case ${open.number} is open on this circuit. Enter it on that case’s charge page.` }
    : chosen;
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
    if (movement.chargeId !== null) {
      const row = await Case.findByPk(movement.caseId ?? 0, { transaction });
      return refuseFields({
        '': `This stands for a charge entry. Change or remove that on case ${row?.number ?? ''}: the book follows.`,
      });
    }
    return writeReversal({ actor, movement, note, at: now }, transaction);
  });
}
