import { refrigerantNamed, saturationAt } from '../refrigerant/saturation.ts';

/** The share of a circuit that its plate charge fills as liquid at 25 °C. Assumption, no source. */
const LIQUID_SHARE = 0.3;
const LITRES_BY_PLACE: Record<string, number> = {
  'cab-front': 3,
  'operator-cab': 3,
  'roof-unit': 3,
  'rear-sleeper': 6,
  'battery-cooling': 4,
  'electronics-cooling': 4,
};
const USUAL_LITRES = 3;

export type VolumeEstimate = { litres: number; basis: string };

/**
 * The inner volume of a refrigerant circuit in litres when nobody knows it: from the plate charge, taken to fill three
 * tenths of it as liquid at 25 °C, else from what kind of circuit it is. Both are rough (common practice, no source);
 * a smallest leak worked out from them is as rough.
 */
export function estimateCircuitVolume(circuit: {
  refrigerant: string;
  plateGrams: number | null;
  place: string;
}): VolumeEstimate {
  const refrigerant = refrigerantNamed(circuit.refrigerant);
  const state = refrigerant && saturationAt(refrigerant, 25);
  if (circuit.plateGrams && state && !('error' in state)) {
    const litres = circuit.plateGrams / (state.liquidKgPerM3 * LIQUID_SHARE);
    return {
      litres: Number(litres.toPrecision(2)),
      basis: `Estimated from the plate charge of ${Math.round(circuit.plateGrams).toLocaleString('en-GB')} g, which fills about a third as liquid.`,
    };
  }
  return {
    litres: LITRES_BY_PLACE[circuit.place] ?? USUAL_LITRES,
    basis: 'Estimated from the kind of circuit, since its plate charge is not on record.',
  };
}
