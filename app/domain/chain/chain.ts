import {
  type Certainty,
  type ChargeKind,
  type MethodOutcome,
  NONE_CONFIRMED,
  type ProofVerdict,
} from './evidence.ts';

export const LINK_KEYS = ['complaint', 'readings', 'trace', 'repair', 'proof', 'charge', 'write-up'] as const;
export type LinkKey = (typeof LINK_KEYS)[number];

export const LINK_NAMES: Record<LinkKey, string> = {
  complaint: 'Complaint',
  readings: 'Readings',
  trace: 'Trace',
  repair: 'Repair',
  proof: 'Proof',
  charge: 'Charge',
  'write-up': 'Write-up',
};

export type LinkState = 'missing' | 'partly' | 'done';
export const LINK_STATE_NAMES: Record<LinkState, string> = {
  missing: 'Missing',
  partly: 'Partly',
  done: 'Done',
};

/** One link of the chain: its state and, in plain words, what it still lacks. */
export type ChainLink = { key: LinkKey; state: LinkState; lacks: string[] };

export const CASE_STATES = [
  'open',
  'leak-found',
  'repaired',
  'proved-tight',
  'running',
  'written-up',
  'parked',
  'closed-unsolved',
] as const;
export type CaseState = (typeof CASE_STATES)[number];
export const CASE_STATE_NAMES: Record<CaseState, string> = {
  open: 'Open',
  'leak-found': 'Leak found',
  repaired: 'Repaired',
  'proved-tight': 'Proved tight',
  running: 'Running',
  'written-up': 'Written up',
  parked: 'Parked',
  'closed-unsolved': 'Closed unsolved',
};

/** The record of a case, reduced to what the chain is worked out from. Times are milliseconds since 1970. */
export type CaseRecord = {
  medium: string;
  complaint: string;
  symptomCount: number;
  hoursKnown: boolean;
  weatherKnown: boolean;
  readings: { kind: string }[];
  methods: { outcome: MethodOutcome }[];
  findings: { componentId: string; failureModeId: string; causeId: string; certainty: Certainty }[];
  tracePhotos: number;
  repairs: { at: number }[];
  proofs: { verdict: ProofVerdict; at: number }[];
  charges: { kind: ChargeKind; at: number }[];
  notes: { readings: string; trace: string; repair: string; proof: string; charge: string };
  writeUpState: 'draft' | 'in-review' | 'sent-back' | 'published' | 'withdrawn' | null;
  backToWork: boolean;
  parked: boolean;
  closedUnsolved: boolean;
};

/**
 * The seven links of a case with the state of each, worked out from the record alone.
 * A link is `missing` when nothing was recorded for it, `done` when it lacks nothing, otherwise `partly`.
 */
export function evidenceChain(record: CaseRecord): ChainLink[] {
  return [
    link('complaint', record.complaint.trim() !== '' || record.symptomCount > 0, complaintLacks(record)),
    link('readings', record.readings.length > 0 || record.notes.readings !== '', readingsLack(record)),
    link(
      'trace',
      record.methods.length + record.findings.length + record.tracePhotos > 0 || record.notes.trace !== '',
      traceLacks(record),
    ),
    link('repair', record.repairs.length > 0 || record.notes.repair !== '', repairLacks(record)),
    link('proof', record.proofs.length > 0 || record.notes.proof !== '', proofLacks(record)),
    link('charge', record.charges.length > 0 || record.notes.charge !== '', chargeLacks(record)),
    link('write-up', record.writeUpState !== null, writeUpLacks(record)),
  ];
}

function link(key: LinkKey, begun: boolean, lacks: string[]): ChainLink {
  return { key, state: !begun ? 'missing' : lacks.length ? 'partly' : 'done', lacks };
}

function complaintLacks(record: CaseRecord): string[] {
  return present([
    record.complaint.trim() === '' && 'what the operator said',
    record.symptomCount === 0 && 'symptoms',
    !record.weatherKnown && 'the weather',
    !record.hoursKnown && 'the machine’s hours',
  ]);
}

function readingsLack({ medium, readings }: CaseRecord): string[] {
  if (readings.length === 0) return ['a reading off a gauge or thermometer'];
  if (medium !== 'refrigerant') return [];
  return present([
    !readings.some(({ kind }) => kind.includes('pressure')) && 'a pressure, standing or running',
    !readings.some(({ kind }) => kind.includes('temperature')) && 'a temperature',
  ]);
}

function traceLacks(record: CaseRecord): string[] {
  const confirmed = confirmedFindings(record);
  return present([
    record.methods.length === 0 && 'a method that was tried',
    confirmed.length === 0 && !endedWithoutLeak(record) && 'a confirmed finding',
    confirmed.length > 0 &&
      confirmed.every(({ failureModeId }) => failureModeId === '') &&
      'how the part failed',
    confirmed.length > 0 && confirmed.every(({ causeId }) => causeId === '') && 'why the part failed',
    record.tracePhotos === 0 && 'a photo of the spot',
  ]);
}

function repairLacks(record: CaseRecord): string[] {
  return present([record.repairs.length === 0 && 'what was done, as entries']);
}

function proofLacks(record: CaseRecord): string[] {
  const newest = newestOf(record.proofs);
  if (!newest) return ['a test with its verdict'];
  return present([
    newest.verdict === 'not-tight' && 'a tight result: the newest test says not tight',
    newest.verdict === 'cannot-tell' && 'a clear result: the newest test cannot tell',
    newest.at < (newestOf(record.repairs)?.at ?? 0) && 'a test after the newest repair',
  ]);
}

function chargeLacks(record: CaseRecord): string[] {
  return present([!record.charges.some(({ kind }) => kind !== 'recovered') && 'what went in']);
}

function writeUpLacks({ writeUpState }: CaseRecord): string[] {
  switch (writeUpState) {
    case null:
      return ['a cause-and-fix note'];
    case 'draft':
      return ['a review'];
    case 'in-review':
      return ['the lead’s word'];
    case 'sent-back':
      return ['what the lead sent it back for'];
    case 'withdrawn':
      return ['a note in force: it was withdrawn'];
    case 'published':
      return [];
  }
}

/** The state that follows from the chain; parking and closing are set by people and come before it. */
export function caseState(record: CaseRecord): CaseState {
  if (record.closedUnsolved) return 'closed-unsolved';
  if (record.parked) return 'parked';
  if (record.writeUpState === 'published') return 'written-up';
  if (provedTight(record)) return record.backToWork ? 'running' : 'proved-tight';
  if (record.repairs.length > 0) return 'repaired';
  if (confirmedFindings(record).length > 0) return 'leak-found';
  return 'open';
}

/** Whether the newest proof says tight and is not older than the newest repair. */
export function provedTight(record: Pick<CaseRecord, 'proofs' | 'repairs'>): boolean {
  const newest = newestOf(record.proofs);
  return newest?.verdict === 'tight' && newest.at >= (newestOf(record.repairs)?.at ?? 0);
}

/** What is missing before a cause may be published as known; empty when nothing is. */
export function lackingForCause(record: CaseRecord): string[] {
  const confirmed = confirmedFindings(record);
  if (confirmed.length === 0) return ['no finding is confirmed'];
  return present([
    confirmed.every(({ causeId }) => causeId === '') && 'no finding says why the part failed',
    !record.methods.some(({ outcome }) => outcome === 'found') &&
      record.tracePhotos === 0 &&
      'neither a method that showed the leak nor a photo of the spot is on record',
  ]);
}

/** What is missing before a cure may be published as proved; empty when nothing is. */
export function lackingForCure(record: CaseRecord): string[] {
  if (record.repairs.length === 0) return ['no repair is on record'];
  const newest = newestOf(record.proofs);
  if (!newest) return ['no proof is on record'];
  return present([
    newest.verdict !== 'tight' && 'the newest proof does not say tight',
    newest.at < (newestOf(record.repairs)?.at ?? 0) && 'the newest proof is older than the newest repair',
  ]);
}

function confirmedFindings({ findings }: CaseRecord) {
  return findings.filter(
    ({ certainty, componentId }) => certainty === 'confirmed' && componentId !== NONE_CONFIRMED,
  );
}

function endedWithoutLeak({ findings }: CaseRecord): boolean {
  return findings.some(({ componentId }) => componentId === NONE_CONFIRMED);
}

function newestOf<T extends { at: number }>(entries: T[]): T | undefined {
  return entries.reduce<T | undefined>(
    (newest, entry) => (!newest || entry.at >= newest.at ? entry : newest),
    undefined,
  );
}

function present(lacks: (string | false)[]): string[] {
  return lacks.filter((lack) => lack !== false);
}
