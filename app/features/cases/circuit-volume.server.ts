import { estimateCircuitVolume, type VolumeEstimate } from '#app/domain/charge/circuit-volume.ts';
import type { Circuit } from '#db/models/index.ts';

export function circuitVolume({ refrigerant, plateChargeGrams, place }: Circuit): VolumeEstimate {
  return estimateCircuitVolume({ refrigerant, plateGrams: plateChargeGrams, place });
}
