import type { Transaction } from 'sequelize';
import { airPressurePa } from '#app/domain/atmosphere/atmosphere.ts';
import { chargeWindow } from '#app/domain/charge/charge-window.ts';
import { type RunningReading, readRunning } from '#app/domain/readings/running.ts';
import { analyseStanding, type StandingAnalysis } from '#app/domain/readings/standing.ts';
import { refrigerantNamed, subcoolingK, superheatK } from '#app/domain/refrigerant/saturation.ts';
import { toSi } from '#app/domain/units/units.ts';
import { type Case, Circuit, Yard } from '#db/models/index.ts';
import { circuitVolume } from './circuit-volume.server.ts';
import type { Evidence } from './evidence.server.ts';

const ZERO_C = 273.15;
/** Half a mark of the usual dial, and a pocket thermometer in the yard. Common practice, no source. */
const GAUGE_ERROR_PA = toSi(2, 'psi');
const THERMOMETER_ERROR_K = 2;

export type Spoken = {
  refrigerant: string | null;
  ambientC: number | null;
  altitudeM: number;
  standing: StandingAnalysis | { error: string } | null;
  running: {
    lowPa: number;
    highPa: number;
    window: { lowPa: readonly [number, number]; highPa: readonly [number, number]; source: string } | null;
    reading: RunningReading | null;
    note: string;
  } | null;
  superheatK: number | null;
  subcoolingK: number | null;
  ventBelowAmbientK: number | null;
};

/** What a refrigerant case's newest readings say together. */
export async function readingsSpeak(
  row: Case,
  { readings }: Pick<Evidence, 'readings'>,
  transaction?: Transaction,
): Promise<Spoken> {
  const circuit = await Circuit.findByPk(row.circuitId, { transaction, rejectOnEmpty: true });
  const yard = row.yardId === null ? null : await Yard.findByPk(row.yardId, { transaction });
  const altitudeM = yard?.altitudeM ?? 0;
  const refrigerant = row.medium === 'refrigerant' ? refrigerantNamed(circuit.refrigerant) : null;
  const newest = (kind: string) => readings.findLast((reading) => reading.kind === kind);
  const celsius = (kind: string) => {
    const found = newest(kind);
    return found ? found.valueSi - ZERO_C : null;
  };
  const ambientC = celsius('ambient-temperature') ?? row.ambientC;
  const spoken: Spoken = {
    refrigerant,
    ambientC,
    altitudeM,
    standing: null,
    running: null,
    superheatK: null,
    subcoolingK: null,
    ventBelowAmbientK: null,
  };
  if (refrigerant === null) return spoken;
  const airPa = airPressurePa(altitudeM);
  const gaugePa = (kind: string) => {
    const found = newest(kind);
    if (!found) return null;
    return found.unit === 'micron' || found.unit === 'mbar' ? found.valueSi - airPa : found.valueSi;
  };
  const standingPa = gaugePa('standing-pressure');
  if (standingPa !== null && ambientC !== null) {
    spoken.standing = analyseStanding({
      refrigerant,
      gaugePa: standingPa,
      ambientC,
      altitudeM,
      gaugeErrorPa: GAUGE_ERROR_PA,
      thermometerErrorK: THERMOMETER_ERROR_K,
      volumeM3: circuitVolume(circuit).litres / 1000,
    });
  }
  const [lowPa, highPa] = [gaugePa('low-side-pressure'), gaugePa('high-side-pressure')];
  if (lowPa !== null && highPa !== null) spoken.running = running(refrigerant, lowPa, highPa, ambientC);
  const [suctionC, liquidC, ventC] = [
    celsius('suction-line-temperature'),
    celsius('liquid-line-temperature'),
    celsius('vent-temperature'),
  ];
  if (lowPa !== null && suctionC !== null)
    spoken.superheatK = numberOrNull(superheatK(refrigerant, lowPa + airPa, suctionC));
  if (highPa !== null && liquidC !== null)
    spoken.subcoolingK = numberOrNull(subcoolingK(refrigerant, highPa + airPa, liquidC));
  if (ventC !== null && ambientC !== null) spoken.ventBelowAmbientK = ambientC - ventC;
  return spoken;
}

function running(
  refrigerant: string,
  lowPa: number,
  highPa: number,
  ambientC: number | null,
): Spoken['running'] {
  const found =
    ambientC === null ? { error: 'The air outside is not on record.' } : chargeWindow(refrigerant, ambientC);
  if ('error' in found) return { lowPa, highPa, window: null, reading: null, note: found.error };
  return { lowPa, highPa, window: found, reading: readRunning(lowPa, highPa, found), note: '' };
}

function numberOrNull(value: number | { error: string }): number | null {
  return typeof value === 'number' ? value : null;
}
