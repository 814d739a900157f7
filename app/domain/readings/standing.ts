import { airPressurePa } from '../atmosphere/atmosphere.ts';
import { saturationAt, vapourGrams } from '../refrigerant/saturation.ts';

export type Standing = {
  refrigerant: string;
  /** Gauge pressure in Pa with the engine off and the circuit at one temperature. */
  gaugePa: number;
  ambientC: number;
  altitudeM: number;
  gaugeErrorPa: number;
  thermometerErrorK: number;
  volumeM3: number | null;
};

export type StandingVerdict = 'liquid' | 'vapour' | 'empty' | 'above';

export type StandingAnalysis = {
  verdict: StandingVerdict;
  /** The gauge pressures in Pa between which liquid would hold the circuit. */
  expectedPa: readonly [number, number];
  /** What vapour alone would weigh, where the circuit's volume is known. */
  vapourGrams: number | null;
  reason: string;
};

/** Below this a circuit counts as empty: air seeps in and out with the weather. Common practice, no source. */
const EMPTY_PA = 10_000;

/**
 * What a standing pressure says: liquid inside holds the circuit at the saturation pressure of the day's temperature,
 * vapour alone stays below it. The band allows for gauge and thermometer. It never says how much liquid is left.
 */
export function analyseStanding(input: Standing): StandingAnalysis | { error: string } {
  const { refrigerant, gaugePa, ambientC, altitudeM, gaugeErrorPa, thermometerErrorK, volumeM3 } = input;
  const cold = saturationAt(refrigerant, ambientC - thermometerErrorK);
  const warm = saturationAt(refrigerant, ambientC + thermometerErrorK);
  if ('error' in cold) return cold;
  if ('error' in warm) return warm;
  const airPa = airPressurePa(altitudeM);
  const expectedPa = [cold.dewPa - airPa - gaugeErrorPa, warm.bubblePa - airPa + gaugeErrorPa] as const;
  const grams = volumeM3 === null ? null : vapourGrams(refrigerant, gaugePa + airPa, ambientC, volumeM3);
  if (gaugePa <= EMPTY_PA) {
    return { verdict: 'empty', expectedPa, vapourGrams: grams, reason: 'Empty, or as good as empty.' };
  }
  if (gaugePa < expectedPa[0]) {
    return {
      verdict: 'vapour',
      expectedPa,
      vapourGrams: grams,
      reason: 'Vapour only: no liquid is left, but refrigerant is.',
    };
  }
  if (gaugePa > expectedPa[1]) {
    return {
      verdict: 'above',
      expectedPa,
      vapourGrams: null,
      reason:
        'Above the saturation pressure of the day: the circuit is warmer than the air, or holds air or another refrigerant.',
    };
  }
  return {
    verdict: 'liquid',
    expectedPa,
    vapourGrams: null,
    reason: 'Liquid is still inside. How much, this pressure cannot say.',
  };
}

/** Whether refrigerant is still inside, so that it has to be recovered before the circuit is evacuated or opened. */
export function needsRecovery(verdict: StandingVerdict): boolean {
  return verdict !== 'empty';
}
