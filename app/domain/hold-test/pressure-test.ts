/** How a circuit under pressure is judged: by a gas, by a liquid that fills it, or by how far a loaded ram creeps. */
const ZERO_C = 273.15;
const STANDARD_AIR_PA = 101_325;
/** Both readings are rounded to a step. */
const STEPS = 2;
/** A full liquid circuit answers a few kelvin with more than most leaks. Common practice, no source. */
const STEADY_K = 3;
/** Cubic expansion of mineral hydraulic oil per kelvin, from memory of fluid tables. */
const OIL_EXPANSION = 7e-4;

export type PressureVerdict = 'tight' | 'leak' | 'cannot-tell';

export type GasTest = {
  /** Absolute pressures in Pa. */
  startPa: number;
  endPa: number;
  startC: number;
  endC: number;
  /** The smallest step of the gauge, in Pa. */
  resolutionPa: number;
  minutes: number;
  /** Where it is known, losses are given as free air too. */
  volumeM3: number | null;
};

export type GasTestResult = {
  verdict: PressureVerdict;
  /** What a tight circuit would have ended at, by p/T constant at constant volume. */
  expectedPa: number;
  lostPa: number;
  lostPaPerMinute: number;
  /** The smallest loss that this gauge could have seen over this time. */
  smallestPaPerMinute: number;
  /** Free air at standard pressure lost, in m³ a minute: V·Δp/(p₀·t). */
  freeAirM3PerMinute: number | null;
};

/** A test with dry nitrogen or air: the fall that is left after the gas law is taken out. */
export function analyseGasTest(test: GasTest): GasTestResult {
  const { startPa, endPa, startC, endC, resolutionPa, minutes, volumeM3 } = test;
  const expectedPa = (startPa * (endC + ZERO_C)) / (startC + ZERO_C);
  const lostPa = expectedPa - endPa;
  const lostPaPerMinute = lostPa / minutes;
  return {
    verdict: verdictOf(lostPa, STEPS * resolutionPa),
    expectedPa,
    lostPa,
    lostPaPerMinute,
    smallestPaPerMinute: (STEPS * resolutionPa) / minutes,
    freeAirM3PerMinute: volumeM3 === null ? null : (volumeM3 * lostPaPerMinute) / STANDARD_AIR_PA,
  };
}

/** Lost beyond what the gauge shows is a leak; risen beyond it, something else moved the pressure. */
function verdictOf(lost: number, visible: number): PressureVerdict {
  if (lost > visible) return 'leak';
  return lost < -visible ? 'cannot-tell' : 'tight';
}

export type LiquidTest = Pick<GasTest, 'startPa' | 'endPa' | 'startC' | 'endC' | 'resolutionPa'>;

/**
 * A test with a pump kit on a circuit full of liquid. No gas law holds there, and no rate can be read from a fall; when
 * the liquid did not keep its temperature, the gauge tells nothing.
 */
export function analyseLiquidTest(test: LiquidTest): {
  verdict: PressureVerdict;
  steady: boolean;
  lostPa: number;
} {
  const steady = Math.abs(test.endC - test.startC) <= STEADY_K;
  const lostPa = test.startPa - test.endPa;
  return { verdict: steady ? verdictOf(lostPa, STEPS * test.resolutionPa) : 'cannot-tell', steady, lostPa };
}

export type RamTest = {
  boreM: number;
  /** The rod's diameter where the load hangs on the rod side, else nothing. */
  rodM: number;
  driftM: number;
  /** The smallest difference that was measured with. */
  stepM: number;
  /** Length of the oil column that carries the load. */
  columnM: number;
  /** How much the oil cooled meanwhile, in K; warming is negative. */
  cooledK: number;
  minutes: number;
};

/**
 * A loaded ram that creeps: oil leaves the side that carries the load, past a valve, a seal or out of a hose. What the
 * cooling oil gives up in volume is taken out first. Answers the loss in m³ a minute, and the smallest that could be seen.
 */
export function analyseRamTest({ boreM, rodM, driftM, stepM, columnM, cooledK, minutes }: RamTest): {
  verdict: PressureVerdict;
  lostM3PerMinute: number;
  smallestM3PerMinute: number;
  cooledM: number;
} {
  const areaM2 = (Math.PI / 4) * (boreM ** 2 - rodM ** 2);
  const cooledM = OIL_EXPANSION * cooledK * columnM;
  const crept = driftM - cooledM;
  return {
    verdict: verdictOf(crept, stepM),
    lostM3PerMinute: (areaM2 * crept) / minutes,
    smallestM3PerMinute: (areaM2 * stepM) / minutes,
    cooledM,
  };
}
