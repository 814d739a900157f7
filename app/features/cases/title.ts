import { NONE_CONFIRMED } from '#app/domain/chain/evidence.ts';
import { nameOf, type Vocabulary } from '#app/domain/vocabulary/vocabulary.ts';

type Titled = {
  complaint: string;
  symptomIds: string[];
  finding: { componentId: string; failureModeId: string } | undefined;
  machineModel: string;
};

const LONGEST = 90;

/** A case's title: the part and how it failed once that is confirmed, until then the operator's first words. */
export function caseTitle(
  { complaint, symptomIds, finding, machineModel }: Titled,
  vocabulary: Vocabulary,
): string {
  if (finding && finding.componentId !== NONE_CONFIRMED) {
    const part = nameOf(vocabulary, 'component', finding.componentId);
    const failure = finding.failureModeId
      ? `, ${nameOf(vocabulary, 'failure-mode', finding.failureModeId).toLowerCase()}`
      : '';
    return shorten(`${part}${failure}${machineModel ? ` (${machineModel})` : ''}`);
  }
  const first = complaint.trim().split(/(?<=[.!?])\s|\n/)[0] ?? '';
  if (first) return shorten(first);
  const symptom = symptomIds[0];
  return symptom ? nameOf(vocabulary, 'symptom', symptom) : 'Complaint not written down yet';
}

function shorten(text: string): string {
  const letters = [...text];
  if (letters.length <= LONGEST) return text;
  const cut = letters.slice(0, LONGEST).join('');
  return `${cut.slice(0, Math.max(cut.lastIndexOf(' '), LONGEST / 2))} …`;
}
