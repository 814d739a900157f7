import { lackingForCause, lackingForCure, provedTight } from '#app/domain/chain/chain.ts';
import {
  CERTAINTY_NAMES,
  CHARGE_KIND_NAMES,
  METHOD_OUTCOME_NAMES,
  PROOF_VERDICT_NAMES,
} from '#app/domain/chain/evidence.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { readingKind } from '#app/domain/readings/readings.ts';
import { unitLabel } from '#app/domain/units/units.ts';
import { nameOf, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import type { Case, Circuit } from '#db/models/index.ts';
import { Circuit as Circuits } from '#db/models/index.ts';
import { findCaseRow } from './change-case.server.ts';
import { caseRecord, type Evidence, loadEvidence } from './evidence.server.ts';

/** An entry of a link, ready to show: a headline, lines beneath it and the values its form starts from. */
export type EntryView = {
  id: number;
  kind: 'reading' | 'method' | 'finding' | 'repair' | 'proof' | 'charge';
  headline: string;
  tone: 'plain' | 'evidence' | 'danger';
  lines: string[];
  note: string;
  byName: string;
  at: string;
  values: Record<string, string>;
  /** The photo of the gauge, for a reading. */
  photoId?: number | null;
};

/** All entries of a case with its notes and the versions of its links. */
export async function loadLinks(actor: Actor, number: number) {
  const row = await findCaseRow(actor, number);
  const [evidence, vocabulary, circuit] = [
    await loadEvidence(row.id),
    await shopVocabulary(actor.shopId),
    await Circuits.findByPk(row.circuitId, { rejectOnEmpty: true }),
  ];
  return { row, evidence, vocabulary, circuit, view: toLinksView(row, evidence, vocabulary, circuit) };
}

export type LinksView = ReturnType<typeof toLinksView>;

function toLinksView(row: Case, evidence: Evidence, vocabulary: Vocabulary, circuit: Circuit) {
  const record = caseRecord(row, evidence);
  return {
    complaint: {
      text: row.complaint,
      symptomIds: evidence.symptoms.map(({ symptomId }) => symptomId),
      symptoms: evidence.symptoms.map(({ symptomId }) => nameOf(vocabulary, 'symptom', symptomId)),
      weather: row.weather,
      ambient: row.ambientEntered,
      ambientUnit: row.ambientUnit,
      ambientLabel: row.ambientEntered ? `${row.ambientEntered} ${unitLabel(row.ambientUnit)}` : '',
      hours: row.hours,
    },
    notes: {
      readings: row.readingsNote,
      trace: row.traceNote,
      repair: row.repairNote,
      proof: row.proofNote,
      charge: row.chargeNote,
    },
    versions: row.versions,
    readings: evidence.readings.map(readingView),
    methods: evidence.methods.map((method) => methodView(method, vocabulary)),
    findings: evidence.findings.map((finding) => ({
      ...findingView(finding, vocabulary),
      componentId: finding.componentId,
      certainty: finding.certainty,
    })),
    repairs: evidence.repairs.map((repair) => repairView(repair, vocabulary)),
    proofs: evidence.proofs.map(proofView),
    charges: evidence.charges.map((charge) => chargeView(charge, evidence.cylinders)),
    overrides: evidence.overrides.map(({ id, gate, lacks, reason, byName, at }) => ({
      id,
      gate,
      lacks,
      reason,
      byName,
      at: at.toISOString(),
    })),
    provedTight: provedTight(record),
    lackingForCause: lackingForCause(record),
    lackingForCure: lackingForCure(record),
    plate: {
      refrigerant: circuit.refrigerant,
      charge: circuit.plateCharge ? `${circuit.plateCharge} ${unitLabel(circuit.plateChargeUnit)}` : '',
      oil: circuit.oil,
      metering: circuit.metering,
      ports: circuit.portsText,
    },
  };
}

type Signed = { id: number; byName: string; note: string };
const signed = ({ id, byName, note }: Signed, at: Date) => ({ id, byName, note, at: at.toISOString() });

function readingView(row: Evidence['readings'][number]): EntryView {
  return {
    ...signed(row, row.takenAt),
    kind: 'reading',
    tone: 'plain',
    headline: `${readingKind(row.kind)?.name ?? row.kind}: ${row.entered} ${unitLabel(row.unit)}`,
    lines: [],
    photoId: row.photoId,
    values: {
      kind: row.kind,
      value: row.entered,
      unit: row.unit,
      note: row.note,
      photo: row.photoId === null ? '' : String(row.photoId),
    },
  };
}

function methodView(row: Evidence['methods'][number], vocabulary: Vocabulary): EntryView {
  return {
    ...signed(row, row.at),
    kind: 'method',
    tone: row.outcome === 'found' ? 'evidence' : 'plain',
    headline: nameOf(vocabulary, 'method', row.methodId),
    lines: [METHOD_OUTCOME_NAMES[row.outcome]],
    values: { methodId: row.methodId, outcome: row.outcome, note: row.note },
  };
}

function findingView(row: Evidence['findings'][number], vocabulary: Vocabulary): EntryView {
  const failure = row.failureModeId
    ? `, ${nameOf(vocabulary, 'failure-mode', row.failureModeId).toLowerCase()}`
    : '';
  return {
    ...signed({ id: row.id, byName: row.byName, note: '' }, row.at),
    kind: 'finding',
    tone: row.certainty === 'confirmed' ? 'evidence' : 'plain',
    headline: `${nameOf(vocabulary, 'component', row.componentId)}${failure}`,
    lines: [
      CERTAINTY_NAMES[row.certainty],
      row.place && `Where: ${row.place}`,
      row.mechanismId && `How it wore: ${nameOf(vocabulary, 'mechanism', row.mechanismId)}`,
      row.causeId && `Why: ${nameOf(vocabulary, 'cause', row.causeId)}`,
      row.why,
    ].filter(Boolean),
    values: {
      componentId: row.componentId,
      failureModeId: row.failureModeId,
      mechanismId: row.mechanismId,
      causeId: row.causeId,
      certainty: row.certainty,
      place: row.place,
      why: row.why,
    },
  };
}

function repairView(row: Evidence['repairs'][number], vocabulary: Vocabulary): EntryView {
  return {
    ...signed(row, row.at),
    kind: 'repair',
    tone: 'plain',
    headline: nameOf(vocabulary, 'repair-action', row.actionId),
    lines: [
      row.componentId && nameOf(vocabulary, 'component', row.componentId),
      row.partNumber && `Part number ${row.partNumber}`,
      row.because === 'opened' ? 'Renewed because the circuit was open' : 'Because it had failed',
    ].filter(Boolean),
    values: {
      actionId: row.actionId,
      componentId: row.componentId,
      partNumber: row.partNumber,
      because: row.because,
      note: row.note,
    },
  };
}

function proofView(row: Evidence['proofs'][number]): EntryView {
  const span = [row.startEntered, row.endEntered].filter(Boolean).join(' → ');
  return {
    ...signed(row, row.at),
    kind: 'proof',
    tone: row.verdict === 'not-tight' ? 'danger' : 'plain',
    headline: PROOF_VERDICT_NAMES[row.verdict],
    lines: [
      row.method,
      row.minutes !== null && `${row.minutes} minutes`,
      span && `Gauge ${span} ${unitLabel(row.unit)}`,
    ].filter((line): line is string => Boolean(line)),
    values: {
      method: row.method,
      verdict: row.verdict,
      minutes: row.minutes === null ? '' : String(row.minutes),
      start: row.startEntered,
      end: row.endEntered,
      unit: row.unit,
      note: row.note,
    },
  };
}

function chargeView(row: Evidence['charges'][number], cylinders: Evidence['cylinders']): EntryView {
  const cylinder = cylinders.find(({ id }) => id === row.cylinderId);
  const amount = row.entered ? `: ${row.entered} ${unitLabel(row.unit)}` : '';
  return {
    ...signed(row, row.at),
    kind: 'charge',
    tone: 'plain',
    headline: `${CHARGE_KIND_NAMES[row.kind]}${amount} ${row.substance}`.trim(),
    lines: [
      cylinder ? `${row.kind === 'recovered' ? 'Into' : 'From'} ${cylinder.label}, in the book` : '',
      row.source && `From or into ${row.source}`,
    ].filter(Boolean),
    values: {
      kind: row.kind,
      substance: row.substance,
      value: row.entered,
      unit: row.unit,
      cylinder: row.cylinderId === null ? '' : String(row.cylinderId),
      source: row.source,
      note: row.note,
    },
  };
}
