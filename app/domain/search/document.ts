import { entry, type Vocabulary } from '../vocabulary/vocabulary.ts';
import { analyse } from './analyser.ts';

/** A case as text and ids, in the shape that is indexed. */
export type CaseText = {
  medium: string;
  title: string;
  complaint: string;
  symptomIds: readonly string[];
  findings: readonly {
    componentId: string;
    failureModeId: string;
    causeId: string;
    place: string;
    why: string;
  }[];
  machine: { number: string; kind: string; make: string; model: string };
  circuitId: string;
  refrigerant: string;
  partNumbers: readonly string[];
  trace: string;
  repair: string;
  proof: string;
  charge: string;
  writeUpTitle: string;
  writeUp: string;
};

/** How often a word of a field counts. Tuned on the public queries as a whole, not on single ones. */
const FIELD_WEIGHTS = {
  title: 1,
  complaint: 2,
  symptom: 1.5,
  part: 2,
  failure: 1.5,
  cause: 0.5,
  place: 1,
  machine: 1,
  trace: 1,
  repair: 0.5,
  proof: 0.25,
  writeUpTitle: 1,
  writeUp: 0.5,
} as const;

export type FieldName = keyof typeof FIELD_WEIGHTS;
export type Prepared = { terms: Map<string, number>; length: number };

/** The fields of a case with the vocabulary's own names and other names of what it refers to. */
export function caseFields(text: CaseText, vocabulary: Vocabulary): Record<FieldName, string> {
  const names = (kind: 'symptom' | 'component' | 'failure-mode' | 'cause' | 'circuit', id: string) => {
    const found = id ? entry(vocabulary, kind, id) : undefined;
    return found ? [found.name, ...found.otherNames].join('. ') : id.replaceAll('-', ' ');
  };
  const each = (pick: (finding: CaseText['findings'][number]) => string) =>
    text.findings.map(pick).join('. ');
  const { machine } = text;
  return {
    title: text.title,
    complaint: text.complaint,
    symptom: text.symptomIds.map((id) => names('symptom', id)).join('. '),
    part: each(({ componentId }) => names('component', componentId)),
    failure: each(({ failureModeId }) => names('failure-mode', failureModeId)),
    cause: each(({ causeId, why }) => `${names('cause', causeId)}. ${why}`),
    place: each(({ place }) => place),
    machine: `${machine.number} ${machine.kind} ${machine.make} ${machine.model} ${names('circuit', text.circuitId)} ${text.refrigerant}`,
    trace: text.trace,
    repair: `${text.repair} ${text.partNumbers.join(' ')}`,
    proof: `${text.proof} ${text.charge}`,
    writeUpTitle: text.writeUpTitle,
    writeUp: text.writeUp,
  };
}

/** Term frequencies with the weight of their field, and the document's length in the same measure. */
export function prepareDocument(fields: Record<FieldName, string>, medium: string): Prepared {
  const terms = new Map<string, number>();
  let length = 0;
  for (const [name, weight] of Object.entries(FIELD_WEIGHTS) as [FieldName, number][]) {
    for (const found of analyse(fields[name], medium)) {
      const share = weight * found.weight;
      terms.set(found.term, (terms.get(found.term) ?? 0) + share);
      if (!found.term.startsWith('~')) length += share;
    }
  }
  return { terms, length };
}
