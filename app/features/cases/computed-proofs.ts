/** How a proof is named whose verdict is worked out from its readings; that verdict is not changed by hand. */
export const COMPUTED_PROOFS = {
  vacuum: 'Vacuum hold, worked out from its readings',
  nitrogen: 'Dry nitrogen, with the temperature taken out',
  air: 'Air leak-down, with the temperature taken out',
  kit: 'Pump kit on the liquid, at one temperature',
  ram: 'Ram under load, with the cooling taken out',
} as const;

export function isComputedProof(method: unknown): boolean {
  return Object.values(COMPUTED_PROOFS).some((name) => name === method);
}

export type PressureTestKind = Exclude<keyof typeof COMPUTED_PROOFS, 'vacuum'>;

/** The pressure test that a medium is proved with and that can be worked out; none for oils that stand without pressure. */
export function pressureTestFor(medium: string): PressureTestKind | null {
  switch (medium) {
    case 'refrigerant':
      return 'nitrogen';
    case 'compressed-air':
      return 'air';
    case 'coolant':
    case 'fuel':
      return 'kit';
    case 'hydraulic-oil':
      return 'ram';
    default:
      return null;
  }
}
