import { Op, type Transaction } from 'sequelize';
import type { CaseRecord } from '#app/domain/chain/chain.ts';
import {
  type Case,
  CaseSymptom,
  Charge,
  Cylinder,
  Finding,
  GateOverride,
  Photo,
  Proof,
  Reading,
  RepairAction,
  TraceMethod,
  WriteUp,
} from '#db/models/index.ts';

/** Everything recorded for a case, oldest first. */
export async function loadEvidence(caseId: number, transaction?: Transaction) {
  const where = { caseId };
  const byTime = {
    where,
    transaction,
    order: [
      ['at', 'ASC'],
      ['id', 'ASC'],
    ] as [string, string][],
  };
  const [symptoms, readings, methods, findings, repairs, proofs, charges, overrides, writeUp, tracePhotos] = [
    await CaseSymptom.findAll({ where, transaction, order: [['id', 'ASC']] }),
    await Reading.findAll({
      where,
      transaction,
      order: [
        ['takenAt', 'ASC'],
        ['id', 'ASC'],
      ],
    }),
    await TraceMethod.findAll(byTime),
    await Finding.findAll(byTime),
    await RepairAction.findAll(byTime),
    await Proof.findAll(byTime),
    await Charge.findAll(byTime),
    await GateOverride.findAll(byTime),
    await WriteUp.findOne({ where, transaction }),
    await Photo.count({
      where: { caseId, deletedAt: null, [Op.or]: [{ link: 'trace' }, { role: ['white', 'uv', 'part'] }] },
      transaction,
    }),
  ];
  const cylinderIds = charges.flatMap(({ cylinderId }) => (cylinderId === null ? [] : [cylinderId]));
  const cylinders =
    cylinderIds.length > 0 ? await Cylinder.findAll({ where: { id: cylinderIds }, transaction }) : [];
  return {
    symptoms,
    readings,
    methods,
    findings,
    repairs,
    proofs,
    charges,
    overrides,
    writeUp,
    tracePhotos,
    cylinders,
  };
}

export type Evidence = Awaited<ReturnType<typeof loadEvidence>>;

/** The record in the shape that the chain is worked out from. */
export function caseRecord(row: Case, evidence: Evidence): CaseRecord {
  return {
    medium: row.medium,
    complaint: row.complaint,
    symptomCount: evidence.symptoms.length,
    hoursKnown: row.hours !== null,
    weatherKnown: row.weather !== '' || row.ambientC !== null,
    readings: evidence.readings.map(({ kind }) => ({ kind })),
    methods: evidence.methods.map(({ outcome }) => ({ outcome })),
    findings: evidence.findings.map(({ componentId, failureModeId, causeId, certainty }) => ({
      componentId,
      failureModeId,
      causeId,
      certainty,
    })),
    tracePhotos: evidence.tracePhotos,
    repairs: evidence.repairs.map(({ at }) => ({ at: at.getTime() })),
    proofs: evidence.proofs.map(({ verdict, at }) => ({ verdict, at: at.getTime() })),
    charges: evidence.charges.map(({ kind, at }) => ({ kind, at: at.getTime() })),
    notes: {
      readings: row.readingsNote,
      trace: row.traceNote,
      repair: row.repairNote,
      proof: row.proofNote,
      charge: row.chargeNote,
    },
    writeUpState: evidence.writeUp?.state ?? null,
    backToWork: row.backToWorkAt !== null,
    parked: row.parkedReason !== null,
    closedUnsolved: row.closedReason !== null,
  };
}
