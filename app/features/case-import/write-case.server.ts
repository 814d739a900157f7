import type { Transaction } from 'sequelize';
import { NONE_CONFIRMED } from '#app/domain/chain/evidence.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { slugOf } from '#app/domain/text/slug.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { nextCaseNumber, setSymptoms } from '#app/features/cases/open-case.server.ts';
import { settleCase } from '#app/features/cases/settle.server.ts';
import { yardByName } from '#app/features/machines/commands.server.ts';
import {
  Case,
  Charge,
  Circuit,
  Finding,
  GateOverride,
  Machine,
  Proof,
  RepairAction,
  TraceMethod,
  WriteUp,
  WriteUpRevision,
} from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import type { ImportLine } from './schema.ts';

const HOUR_MS = 60 * 60_000;
const NO_LEAK_FOUND = 'no-leak-found';
const OVERRIDE_REASON = 'Brought in from an earlier record that keeps its evidence in words.';

/** Writes one imported case with its machine and circuit, in a transaction of its own. */
export async function writeImportedCase(
  actor: Actor,
  line: ImportLine,
  now: Date,
): Promise<{ created: boolean; caseId: number }> {
  return transact(async (transaction) => {
    const openedAt = new Date(line.openedAt);
    const yardId = await yardByName(actor.shopId, line.yard, transaction);
    const machine = await machineOf(actor, line, yardId, now, transaction);
    const circuit = await circuitOf(machine, line, now, transaction);
    const where = { shopId: actor.shopId, externalId: line.id };
    const before = await Case.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
    const closedAt =
      line.downtimeHours === null ? null : new Date(openedAt.getTime() + line.downtimeHours * HOUR_MS);
    const values = {
      machineId: machine.id,
      circuitId: circuit.id,
      yardId,
      medium: line.medium,
      openedAt,
      technicianName: line.technician,
      severity: line.severity,
      hours: line.hours,
      complaint: line.complaint,
      ambientC: line.ambientC,
      ambientEntered: line.ambientC === null ? '' : String(line.ambientC),
      ambientUnit: line.ambientC === null ? '' : 'C',
      traceNote: line.traceNotes,
      repairNote: line.repair,
      proofNote: line.proofNotes,
      backToWorkAt: closedAt,
      downtimeHours: line.downtimeHours,
      imported: true,
      updatedAt: now,
    };
    const row = before
      ? await before.update(values, { transaction })
      : await Case.create(
          { ...where, ...values, state: 'open', number: await nextCaseNumber(actor.shopId, transaction) },
          { transaction },
        );
    await setSymptoms(row, line.symptoms, transaction);
    await writeEvidence(row, line, openedAt, closedAt ?? openedAt, transaction);
    await writeNote(actor, row, line, closedAt ?? openedAt, transaction);
    const action = before ? 'import-updated' : 'imported';
    await recordAudit(
      { actor, action, subject: 'case', subjectId: row.id, caseId: row.id, detail: { id: line.id }, at: now },
      transaction,
    );
    await settleCase(row.id, transaction, now);
    return { created: before === null, caseId: row.id };
  });
}

async function machineOf(
  actor: Actor,
  line: ImportLine,
  yardId: number | null,
  now: Date,
  transaction: Transaction,
): Promise<Machine> {
  const where = { shopId: actor.shopId, number: line.machineNo };
  const found = await Machine.findOne({ where, transaction });
  if (found) {
    if ((line.hours ?? 0) > (found.hours ?? 0)) await found.update({ hours: line.hours }, { transaction });
    return found;
  }
  const { machineKind: kind, make, model, hours } = line;
  return Machine.create(
    { ...where, kind, make, model, hours, yardId, createdAt: now, updatedAt: now },
    { transaction },
  );
}

async function circuitOf(
  machine: Machine,
  line: ImportLine,
  now: Date,
  transaction: Transaction,
): Promise<Circuit> {
  const where = { shopId: machine.shopId, machineId: machine.id, medium: line.medium, place: line.circuit };
  const found = await Circuit.findOne({ where, transaction });
  if (found) {
    if (line.refrigerant && !found.refrigerant)
      await found.update({ refrigerant: line.refrigerant }, { transaction });
    return found;
  }
  return Circuit.create(
    { ...where, refrigerant: line.refrigerant, metering: '', createdAt: now, updatedAt: now },
    { transaction },
  );
}

/** What the record says of trace, repair, proof and charge, as entries; those of an earlier import are replaced. */
async function writeEvidence(
  row: Case,
  line: ImportLine,
  at: Date,
  end: Date,
  transaction: Transaction,
): Promise<void> {
  const of = { shopId: row.shopId, caseId: row.id, byName: line.technician };
  const earlier = { where: { caseId: row.id, byId: null }, transaction };
  await TraceMethod.destroy(earlier);
  await Finding.destroy(earlier);
  await RepairAction.destroy(earlier);
  await Proof.destroy(earlier);
  await Charge.destroy(earlier);
  await TraceMethod.bulkCreate(
    line.methods.map((methodId) => ({ ...of, methodId, outcome: 'not-recorded' as const, at })),
    { transaction },
  );
  const found =
    line.component !== '' && line.component !== NONE_CONFIRMED && line.failureMode !== NO_LEAK_FOUND;
  if (line.component !== '') {
    await Finding.create(
      {
        ...of,
        componentId: line.component,
        failureModeId: line.failureMode,
        causeId: line.causeId,
        place: line.locationDetail,
        why: line.cause,
        certainty: 'confirmed',
        at,
      },
      { transaction },
    );
  }
  if (line.repair !== '' && found) {
    await RepairAction.create(
      {
        ...of,
        actionId: 'replace-part',
        componentId: line.component,
        because: 'failed',
        note: line.repair,
        at: end,
      },
      { transaction },
    );
  }
  if (line.proofNotes !== '' && found) {
    await Proof.create(
      {
        ...of,
        method: 'As written down by the shop',
        verdict: 'tight',
        minutes: line.holdMinutes,
        note: line.proofNotes,
        at: end,
      },
      { transaction },
    );
  }
  if (line.chargeGrams !== null && line.chargeGrams > 0) {
    await Charge.create(
      {
        ...of,
        kind: 'charged',
        substance: line.refrigerant,
        entered: String(line.chargeGrams),
        unit: 'g',
        amountSi: line.chargeGrams / 1000,
        at: end,
      },
      { transaction },
    );
  }
}

/** The note that came with the record, published; the gate's missing evidence is passed on the record's own word. */
async function writeNote(
  actor: Actor,
  row: Case,
  line: ImportLine,
  at: Date,
  transaction: Transaction,
): Promise<void> {
  if (line.causeAndFix === '') return;
  const title = line.noteTitle || `Note on ${line.id}`;
  const text = { title, body: line.causeAndFix, updatedAt: at };
  const before = await WriteUp.findOne({ where: { caseId: row.id }, transaction });
  if (before) {
    if (before.title === title && before.body === line.causeAndFix) return;
    if (before.authorId !== null) return;
    await before.update({ ...text, version: before.version + 1 }, { transaction });
    return;
  }
  const slug = `${slugOf(title, 80) || 'note'}-${row.number}`;
  const note = await WriteUp.create(
    {
      ...text,
      shopId: row.shopId,
      caseId: row.id,
      slug,
      state: 'published',
      authorName: line.technician,
      publishedAt: at,
      createdAt: at,
    },
    { transaction },
  );
  await WriteUpRevision.create(
    {
      shopId: row.shopId,
      writeUpId: note.id,
      number: 1,
      title,
      body: line.causeAndFix,
      publishedAt: at,
      byName: actor.name,
    },
    { transaction },
  );
  await GateOverride.create(
    {
      shopId: row.shopId,
      caseId: row.id,
      gate: 'publish-write-up',
      lacks: ['entries for methods and photos'],
      reason: OVERRIDE_REASON,
      at,
      byId: actor.userId || null,
      byName: actor.name,
    },
    { transaction },
  );
}
