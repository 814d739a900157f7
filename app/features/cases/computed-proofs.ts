/** How a proof is named whose verdict is worked out from its readings; that verdict is not changed by hand. */
export const COMPUTED_PROOFS = {
  vacuum: 'Vacuum hold, worked out from its readings',
  nitrogen: 'Dry nitrogen, with the temperature taken out',
} as const;

export function isComputedProof(method: unknown): boolean {
  return Object.values(COMPUTED_PROOFS).some((name) => name === method);
}
