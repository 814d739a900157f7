import { Op, type Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { isUnit, parseTypedNumber, toSi } from '#app/domain/units/units.ts';
import { entry, nameOf } from '#app/domain/vocabulary/vocabulary.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { done, type FieldErrors, Forbidden, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { Case, CaseSymptom, Circuit, Machine, Shop } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import type { OpenCaseInput } from './schema.ts';
import { settleCase } from './settle.server.ts';

const KELVIN_AT_0C = 273.15;

/** °C from what was typed, or null; the typed text and unit are kept beside it. */
export function ambientColumns(typed: string, unit: string) {
  const number = parseTypedNumber(typed);
  const known = number !== null && isUnit(unit);
  return {
    ambientEntered: known ? typed : '',
    ambientUnit: known ? unit : '',
    ambientC: known ? toSi(number, unit) - KELVIN_AT_0C : null,
  };
}

/** The next number of the shop's cases; two people opening at once get one each. */
export async function nextCaseNumber(shopId: number, transaction: Transaction): Promise<number> {
  const shop = await Shop.findByPk(shopId, {
    transaction,
    lock: transaction.LOCK.UPDATE,
    rejectOnEmpty: true,
  });
  const number = shop.nextCaseNumber;
  await shop.update({ nextCaseNumber: number + 1 }, { transaction });
  return number;
}

/** Opens a case on a machine of the shop, in the operator's words. */
export async function openCase(
  actor: Actor,
  input: OpenCaseInput,
  now: Date,
): Promise<Outcome<{ number: number }>> {
  if (!may(actor.role, 'case:open')) throw new Forbidden();
  const vocabulary = await shopVocabulary(actor.shopId);
  const unknown = input.symptoms.filter((id) => !entry(vocabulary, 'symptom', id));
  return transact(async (transaction) => {
    const machine = await Machine.findOne({
      where: { shopId: actor.shopId, number: input.machine },
      transaction,
    });
    if (!machine)
      return refuseFields({
        machine: 'No machine of this shop has this number. Add it under Machines first.',
      });
    if (unknown.length > 0)
      return refuseFields({ symptoms: 'A symptom is not in the catalogue. Choose others.' });
    const circuits = await Circuit.findAll({
      where: { machineId: machine.id },
      order: [['id', 'ASC']],
      transaction,
    });
    const circuit = await chooseCircuit(
      actor,
      machine.id,
      circuits,
      input.circuit,
      vocabulary,
      transaction,
      now,
    );
    if (!(circuit instanceof Circuit)) return refuseFields(circuit);
    const number = await nextCaseNumber(actor.shopId, transaction);
    const row = await Case.create(
      {
        shopId: actor.shopId,
        number,
        machineId: machine.id,
        circuitId: circuit.id,
        yardId: machine.yardId,
        medium: circuit.medium,
        state: 'open',
        openedById: actor.userId,
        openedAt: now,
        updatedAt: now,
        technicianName: actor.name,
        assigneeId: actor.userId,
        severity: input.severity ?? null,
        hours: input.hours,
        complaint: input.complaint,
        weather: input.weather,
        ...ambientColumns(input.ambient, input.ambientUnit),
      },
      { transaction },
    );
    await setSymptoms(row, input.symptoms, transaction);
    if (input.hours !== null && input.hours > (machine.hours ?? 0))
      await machine.update({ hours: input.hours }, { transaction });
    await recordAudit(
      {
        actor,
        action: 'opened',
        subject: 'case',
        subjectId: row.id,
        caseId: row.id,
        detail: { machine: machine.number },
        at: now,
      },
      transaction,
    );
    await settleCase(row.id, transaction, now);
    return done({ number });
  });
}

/** The circuit by id, by `medium:place` (added when the machine has none like it), or the machine's only one. */
async function chooseCircuit(
  actor: Actor,
  machineId: number,
  circuits: Circuit[],
  wanted: string,
  vocabulary: Awaited<ReturnType<typeof shopVocabulary>>,
  transaction: Transaction,
  now: Date,
): Promise<Circuit | FieldErrors> {
  if (wanted === '') {
    const [only, ...others] = circuits;
    return only && others.length === 0 ? only : { circuit: 'Which circuit? Choose one.' };
  }
  const [medium = '', place = ''] = wanted.split(':');
  const found = circuits.find(
    (circuit) => String(circuit.id) === wanted || (circuit.medium === medium && circuit.place === place),
  );
  if (found) return found;
  const known = entry(vocabulary, 'circuit', place);
  if (!known?.media.includes(medium)) return { circuit: 'This machine has no such circuit. Choose another.' };
  return Circuit.create(
    {
      shopId: actor.shopId,
      machineId,
      place,
      medium,
      label: nameOf(vocabulary, 'circuit', place),
      metering: '',
      createdAt: now,
      updatedAt: now,
    },
    { transaction },
  );
}

export async function setSymptoms(row: Case, symptomIds: string[], transaction: Transaction): Promise<void> {
  const wanted = [...new Set(symptomIds)];
  await CaseSymptom.destroy({
    where: { caseId: row.id, symptomId: { [Op.notIn]: [...wanted, ''] } },
    transaction,
  });
  await CaseSymptom.bulkCreate(
    wanted.map((symptomId) => ({ shopId: row.shopId, caseId: row.id, symptomId })),
    { transaction, ignoreDuplicates: true },
  );
}
