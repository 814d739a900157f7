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

export const MOVEMENT_KINDS = ['bought', 'returned', 'charged', 'recovered', 'reclaimed', 'lost'] as const;
export type MovementKind = (typeof MOVEMENT_KINDS)[number];
export const MOVEMENT_KIND_NAMES: Record<MovementKind, string> = {
  bought: 'Bought',
  returned: 'Returned to the supplier',
  charged: 'Charged into a machine',
  recovered: 'Recovered from a machine',
  reclaimed: 'Sent for reclaim',
  lost: 'Found missing on the scale',
};

/** Whether a kind of movement names a machine. */
export const NEEDS_MACHINE: Record<MovementKind, boolean> = {
  bought: false,
  returned: false,
  charged: true,
  recovered: true,
  reclaimed: false,
  lost: false,
};

export const cylinderAccount = (cylinderId: number) => `cylinder:${cylinderId}`;
export const machineAccount = (machineId: number) => `machine:${machineId}`;

/** From which account a movement takes and to which it gives. */
export function accountsOf(
  kind: MovementKind,
  cylinderId: number,
  machineId: number | null,
): { from: string; to: string } {
  const cylinder = cylinderAccount(cylinderId);
  const machine = machineAccount(machineId ?? 0);
  switch (kind) {
    case 'bought':
      return { from: 'supplier', to: cylinder };
    case 'returned':
      return { from: cylinder, to: 'supplier' };
    case 'charged':
      return { from: cylinder, to: machine };
    case 'recovered':
      return { from: machine, to: cylinder };
    case 'reclaimed':
      return { from: cylinder, to: 'reclaimer' };
    case 'lost':
      return { from: cylinder, to: 'lost' };
  }
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
