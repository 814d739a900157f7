/** A rule of the trade or the law that refuses a step; `lacks` says what stands against it. Empty means: go on. */
export type Gate = { gate: string; rule: string; lacks: string[] };

export const GATE_NAMES: Record<string, string> = {
  'publish-write-up': 'Publishing the note',
  'charge-unproved': 'Charging before the proof',
  'charge-past-plate': 'Charging past the plate',
  'evacuate-unrecovered': 'Evacuating before recovery',
};

const WEIGHING_ERROR = 1.02;

export type ChargeStep = {
  medium: string;
  provedTight: boolean;
  proofLacks: string[];
  /** Grams of this charge, what was charged since the newest recovery, and the plate's; null where not known. */
  grams: number | null;
  sinceRecoveryGrams: number;
  plateGrams: number | null;
};

/** What stands against putting fluid into a circuit now. Only refrigerant circuits have these gates. */
export function chargeGates(step: ChargeStep): Gate[] {
  if (step.medium !== 'refrigerant') return [];
  const gates: Gate[] = [];
  if (!step.provedTight) {
    gates.push({
      gate: 'charge-unproved',
      rule: 'No refrigerant goes in while the newest proof is missing, older than the newest repair, or not tight.',
      lacks: step.proofLacks,
    });
  }
  const total = step.grams === null ? null : step.grams + step.sinceRecoveryGrams;
  if (total !== null && step.plateGrams !== null && total > step.plateGrams * WEIGHING_ERROR) {
    gates.push({
      gate: 'charge-past-plate',
      rule: 'No more goes in than the plate says.',
      lacks: [`this would make ${Math.round(total)} g where the plate says ${Math.round(step.plateGrams)} g`],
    });
  }
  return gates;
}

export type EvacuationStep = { medium: string; refrigerantInside: boolean | null; recovered: boolean };

/** What stands against pulling a vacuum now: refrigerant that is still inside and was not recovered. */
export function evacuationGates({ medium, refrigerantInside, recovered }: EvacuationStep): Gate[] {
  if (medium !== 'refrigerant' || refrigerantInside !== true || recovered) return [];
  return [
    {
      gate: 'evacuate-unrecovered',
      rule: 'Refrigerant is recovered and weighed before a circuit is evacuated; letting it go is unlawful in many places.',
      lacks: [
        'the standing pressure says that refrigerant is still inside, and no entry says that it was taken out',
      ],
    },
  ];
}
