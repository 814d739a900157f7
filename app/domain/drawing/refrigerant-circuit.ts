/** A part on the drawing: its number there and its centre, in units of the drawing. */
export type Spot = { id: string; x: number; y: number; branch: boolean };

export const DRAWING = { width: 352, height: 560 } as const;

/** How wide a target must be on the drawing, so that a gloved finger hits it at phone width. */
export const TARGET = 44;

/**
 * Where the parts of a cab circuit stand on the schematic: evaporator above, condenser below, low side left, high side
 * right, a second branch in the middle. A schematic of the common arrangement (common practice, no source), not of a machine.
 */
export const REFRIGERANT_SPOTS: readonly Spot[] = [
  { id: 'evaporator', x: 176, y: 44, branch: false },
  { id: 'evap-line-joint', x: 88, y: 44, branch: false },
  { id: 'expansion-valve', x: 264, y: 44, branch: false },
  { id: 'accumulator', x: 40, y: 116, branch: false },
  { id: 'suction-hose', x: 40, y: 220, branch: false },
  { id: 'service-valve-lp', x: 40, y: 288, branch: false },
  { id: 'compressor-manifold-joint', x: 84, y: 352, branch: false },
  { id: 'compressor-shaft-seal', x: 32, y: 416, branch: false },
  { id: 'compressor-body', x: 84, y: 416, branch: false },
  { id: 'relief-valve', x: 136, y: 416, branch: false },
  { id: 'discharge-hose', x: 84, y: 484, branch: false },
  { id: 'condenser', x: 190, y: 516, branch: false },
  { id: 'condenser-joint', x: 284, y: 516, branch: false },
  { id: 'service-valve-hp', x: 312, y: 408, branch: false },
  { id: 'liquid-line', x: 312, y: 340, branch: false },
  { id: 'pressure-switch', x: 312, y: 276, branch: false },
  { id: 'receiver-drier', x: 312, y: 196, branch: false },
  { id: 'rear-circuit-joint', x: 252, y: 120, branch: true },
  { id: 'branch-solenoid', x: 232, y: 180, branch: true },
  { id: 'rear-evaporator', x: 164, y: 208, branch: true },
  { id: 'roof-line-joint', x: 108, y: 156, branch: true },
  { id: 'battery-chiller', x: 176, y: 296, branch: true },
];

/** The pipes, as paths: which side of the circuit, and whether of the second branch. */
export const PIPES: readonly { side: 'low' | 'high'; branch: boolean; path: string }[] = [
  { side: 'low', branch: false, path: 'M128 44H40V352H84V384' },
  { side: 'high', branch: false, path: 'M84 448V516H120' },
  { side: 'high', branch: false, path: 'M252 516H312V44H222' },
  { side: 'high', branch: true, path: 'M312 120H232V208H200' },
  { side: 'low', branch: true, path: 'M130 208H108V120H40' },
  { side: 'high', branch: true, path: 'M232 208V296H212' },
  { side: 'low', branch: true, path: 'M142 296H108V208' },
];
