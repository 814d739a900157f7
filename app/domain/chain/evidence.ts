/** What a method of tracing showed. `not-recorded` is for records brought in from elsewhere that name the method only. */
export const METHOD_OUTCOMES = ['found', 'nothing', 'unclear', 'not-recorded'] as const;
export type MethodOutcome = (typeof METHOD_OUTCOMES)[number];
export const METHOD_OUTCOME_NAMES: Record<MethodOutcome, string> = {
  found: 'Showed the leak',
  nothing: 'Showed nothing',
  unclear: 'Could not tell',
  'not-recorded': 'Outcome not recorded',
};

export const CERTAINTIES = ['suspected', 'confirmed', 'ruled-out'] as const;
export type Certainty = (typeof CERTAINTIES)[number];
export const CERTAINTY_NAMES: Record<Certainty, string> = {
  suspected: 'Suspected',
  confirmed: 'Confirmed',
  'ruled-out': 'Checked, not it',
};

export const PROOF_VERDICTS = ['tight', 'not-tight', 'cannot-tell'] as const;
export type ProofVerdict = (typeof PROOF_VERDICTS)[number];
export const PROOF_VERDICT_NAMES: Record<ProofVerdict, string> = {
  tight: 'Tight, as far as this test can show',
  'not-tight': 'Not tight',
  'cannot-tell': 'Cannot tell',
};

export const CHARGE_KINDS = ['recovered', 'charged', 'not-needed'] as const;
export type ChargeKind = (typeof CHARGE_KINDS)[number];
export const CHARGE_KIND_NAMES: Record<ChargeKind, string> = {
  recovered: 'Taken out',
  charged: 'Put in',
  'not-needed': 'No fluid needed',
};

/** The vocabulary's component for a case in which no leaking part was confirmed. */
export const NONE_CONFIRMED = 'none-confirmed';
