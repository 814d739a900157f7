import type { Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { isUnit, parseTypedNumber, toSi, UNITS } from '#app/domain/units/units.ts';
import { entry } from '#app/domain/vocabulary/vocabulary.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { done, Forbidden, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { AuditEntry, Circuit, Machine, Yard } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import type { CircuitInput, MachineInput } from './schema.ts';

function requireMay(actor: Actor, action: Action): void {
  if (!may(actor.role, action)) throw new Forbidden();
}

/** The yard of that name, made when the shop has none yet; empty is no yard. */
export async function yardByName(
  shopId: number,
  name: string,
  transaction: Transaction,
): Promise<number | null> {
  if (name === '') return null;
  const [yard] = await Yard.findOrCreate({ where: { shopId, name }, transaction });
  return yard.id;
}

const TAKEN = { number: 'Another machine of this shop has this number.' };

export async function createMachine(
  actor: Actor,
  { yard, ...input }: MachineInput,
  now: Date,
): Promise<Outcome<{ id: number }>> {
  requireMay(actor, 'machine:edit');
  return transact(async (transaction) => {
    const where = { shopId: actor.shopId, number: input.number };
    if (await Machine.count({ where, transaction })) return refuseFields(TAKEN);
    const yardId = await yardByName(actor.shopId, yard, transaction);
    const machine = await Machine.create(
      { ...input, shopId: actor.shopId, yardId, createdAt: now, updatedAt: now },
      { transaction },
    );
    await recordAudit(
      {
        actor,
        action: 'machine-added',
        subject: 'machine',
        subjectId: machine.id,
        detail: { number: input.number },
      },
      transaction,
    );
    return done({ id: machine.id });
  });
}

type ChangeMachine = { actor: Actor; machineId: number; version: number | undefined; input: MachineInput };

export async function changeMachine(
  { actor, machineId, version, input }: ChangeMachine,
  now: Date,
): Promise<Outcome> {
  requireMay(actor, 'machine:edit');
  return transact(async (transaction) => {
    const where = { id: machineId, shopId: actor.shopId };
    const machine = await Machine.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
    if (!machine) throw new NotFound();
    if (version !== undefined && version !== machine.version) {
      const { number, kind, make, model, serial, year, hours, notes } = machine;
      return conflict(
        'machine',
        machineId,
        machine,
        { number, kind, make, model, serial, year, hours, notes },
        transaction,
      );
    }
    const { yard, ...values } = input;
    if (values.number !== machine.number) {
      const other = await Machine.count({
        where: { shopId: actor.shopId, number: values.number },
        transaction,
      });
      if (other) return refuseFields(TAKEN);
    }
    const yardId = await yardByName(actor.shopId, yard, transaction);
    await machine.update(
      { ...values, yardId, version: machine.version + 1, updatedAt: now },
      { transaction },
    );
    await recordAudit(
      { actor, action: 'machine-changed', subject: 'machine', subjectId: machineId, detail: { ...input } },
      transaction,
    );
    return done();
  });
}

async function conflict(
  subject: string,
  subjectId: number,
  { updatedAt, version }: { updatedAt: Date; version: number },
  theirs: Record<string, string | number | null>,
  transaction: Transaction,
) {
  const last = await AuditEntry.findOne({
    where: { subject, subjectId },
    order: [['id', 'DESC']],
    transaction,
  });
  return {
    ok: false as const,
    refused: 'conflict' as const,
    byName: last?.byName ?? 'Somebody',
    at: updatedAt.toISOString(),
    version,
    theirs: Object.fromEntries(
      Object.entries(theirs).map(([name, value]) => [name, value === null ? '' : String(value)]),
    ),
  };
}

type SaveCircuit = {
  actor: Actor;
  machineId: number;
  circuitId: number | null;
  version: number | undefined;
  input: CircuitInput;
};

/** Adds a circuit to a machine, or changes one. */
export async function saveCircuit(options: SaveCircuit, now: Date): Promise<Outcome<{ id: number }>> {
  const { actor, machineId, circuitId, version, input } = options;
  requireMay(actor, 'machine:edit');
  const vocabulary = await shopVocabulary(actor.shopId);
  const [medium = '', place = ''] = input.circuit.split(':');
  if (!entry(vocabulary, 'circuit', place)?.media.includes(medium))
    return refuseFields({ circuit: 'Choose the circuit.' });
  return transact(async (transaction) => {
    const machine = await Machine.findOne({ where: { id: machineId, shopId: actor.shopId }, transaction });
    if (!machine) throw new NotFound();
    const values = { ...circuitColumns(input, medium), medium, place, updatedAt: now };
    if (circuitId === null) {
      const circuit = await Circuit.create(
        { ...values, shopId: actor.shopId, machineId, createdAt: now },
        { transaction },
      );
      await recordAudit(
        { actor, action: 'circuit-added', subject: 'circuit', subjectId: circuit.id, detail: { ...input } },
        transaction,
      );
      return done({ id: circuit.id });
    }
    const circuit = await Circuit.findOne({
      where: { id: circuitId, machineId },
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!circuit) throw new NotFound();
    if (version !== undefined && version !== circuit.version) {
      const { label, refrigerant, plateCharge, oil, metering, portsText } = circuit;
      return conflict(
        'circuit',
        circuitId,
        circuit,
        { label, refrigerant, plateCharge, oil, metering, portsText },
        transaction,
      );
    }
    await circuit.update({ ...values, version: circuit.version + 1 }, { transaction });
    await recordAudit(
      { actor, action: 'circuit-changed', subject: 'circuit', subjectId: circuitId, detail: { ...input } },
      transaction,
    );
    return done({ id: circuitId });
  });
}

/** The columns of a circuit; what belongs to refrigerant alone is emptied for other media. */
function circuitColumns(
  { label, refrigerant, plateCharge, plateChargeUnit, oil, metering, portsText }: CircuitInput,
  medium: string,
) {
  const number = parseTypedNumber(plateCharge);
  const isMass = number !== null && isUnit(plateChargeUnit) && UNITS[plateChargeUnit].quantity === 'mass';
  const isRefrigerant = medium === 'refrigerant';
  return {
    label,
    oil,
    portsText,
    plateCharge,
    plateChargeUnit: plateCharge ? plateChargeUnit : '',
    plateChargeGrams: isMass ? toSi(number, plateChargeUnit) * 1000 : null,
    refrigerant: isRefrigerant ? refrigerant : '',
    metering: isRefrigerant ? metering : ('' as const),
  };
}
