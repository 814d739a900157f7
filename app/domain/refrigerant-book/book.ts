/**
 * The refrigerant book: double entry in whole grams. Every movement takes from one account and gives to another, so what
 * is in all accounts together never changes. A movement is never edited: it is reversed and entered again.
 */
export const CYLINDER_KINDS = ['new', 'recovery', 'can'] as const;
export type CylinderKind = (typeof CYLINDER_KINDS)[number];
export const CYLINDER_KIND_NAMES: Record<CylinderKind, string> = {
  new: 'New refrigerant',
  recovery: 'Recovery cylinder',
  can: 'Small can',
};

export const MOVEMENT_KINDS = [
  'bought',
  'opened',
  'charged',
  'recovered',
  'weighed',
  'reclaimed',
  'returned',
  'lost',
] as const;
export type MovementKind = (typeof MOVEMENT_KINDS)[number];
export const MOVEMENT_KIND_NAMES: Record<MovementKind, string> = {
  bought: 'Bought',
  opened: 'Opened',
  charged: 'Charged into a machine',
  recovered: 'Recovered from a machine',
  weighed: 'Weighed on the scale',
  reclaimed: 'Sent for reclaim',
  returned: 'Returned to the supplier',
  lost: 'Lost: spilt, burst or let go by accident',
};

/** Whether a kind of movement names a machine and its circuit. */
export const NEEDS_MACHINE: Record<MovementKind, boolean> = {
  bought: false,
  opened: false,
  charged: true,
  recovered: true,
  weighed: false,
  reclaimed: false,
  returned: false,
  lost: false,
};

export const cylinderAccount = (cylinderId: number) => `cylinder:${cylinderId}`;
export const circuitAccount = (circuitId: number) => `circuit:${circuitId}`;
/** What the scale found missing, less what it found too much. */
export const SCALE_ACCOUNT = 'scale';

/** Where refrigerant can be: the kinds of account. */
export const PLACES = ['supplier', 'cylinder', 'circuit', 'reclaimer', 'lost', SCALE_ACCOUNT] as const;
export type Place = (typeof PLACES)[number];
export const PLACE_NAMES: Record<Place, string> = {
  supplier: 'Came from suppliers',
  cylinder: 'In cylinders and cans',
  circuit: 'Went into circuits and did not come out',
  reclaimer: 'Gone to reclaim',
  lost: 'Lost by accident, as entered',
  scale: 'Missing on the scale, unexplained',
};

/** The kind of place that an account is. */
export function placeOf(account: string): Place {
  const [kind] = account.split(':');
  return PLACES.find((place) => place === kind) ?? 'lost';
}

/** From which account a movement takes and to which it gives. An opening moves nothing. */
export function accountsOf(
  kind: Exclude<MovementKind, 'weighed'>,
  cylinderId: number,
  circuitId: number | null,
): { from: string; to: string } {
  const cylinder = cylinderAccount(cylinderId);
  const circuit = circuitAccount(circuitId ?? 0);
  switch (kind) {
    case 'bought':
      return { from: 'supplier', to: cylinder };
    case 'opened':
      return { from: cylinder, to: cylinder };
    case 'returned':
      return { from: cylinder, to: 'supplier' };
    case 'charged':
      return { from: cylinder, to: circuit };
    case 'recovered':
      return { from: circuit, to: cylinder };
    case 'reclaimed':
      return { from: cylinder, to: 'reclaimer' };
    case 'lost':
      return { from: cylinder, to: 'lost' };
  }
}

/** The movement that brings the book to what the scale shows, in grams: what is missing leaves the cylinder. */
export function weighing(
  cylinderId: number,
  bookGrams: number,
  scaleGrams: number,
): { from: string; to: string; grams: number } {
  const cylinder = cylinderAccount(cylinderId);
  return scaleGrams <= bookGrams
    ? { from: cylinder, to: SCALE_ACCOUNT, grams: bookGrams - scaleGrams }
    : { from: SCALE_ACCOUNT, to: cylinder, grams: scaleGrams - bookGrams };
}

export type Entry = { fromAccount: string; toAccount: string; grams: number };

/** What each account holds, in grams; the sum over all is nothing. */
export function balances(entries: readonly Entry[]): Map<string, number> {
  const held = new Map<string, number>();
  for (const { fromAccount, toAccount, grams } of entries) {
    held.set(fromAccount, (held.get(fromAccount) ?? 0) - grams);
    held.set(toAccount, (held.get(toAccount) ?? 0) + grams);
  }
  return held;
}

/**
 * Grams that a circuit has lost for certain: what went in beyond what came out and what the plate lets it hold. Null
 * without a plate. What it lost before the book began, or holds less than its plate now, is not in it.
 */
export function leakedBeyondPlate(
  chargedGrams: number,
  recoveredGrams: number,
  plateGrams: number | null,
): number | null {
  return plateGrams === null ? null : Math.max(chargedGrams - recoveredGrams - plateGrams, 0);
}
