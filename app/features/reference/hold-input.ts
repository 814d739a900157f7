import { airPressurePa } from '#app/domain/atmosphere/atmosphere.ts';
import type { HoldTest, Sample } from '#app/domain/hold-test/hold-test.ts';
import { parseTypedNumber, toSi } from '#app/domain/units/units.ts';

export const HOLD_GAUGES = ['micron', 'mbar', 'inHg'] as const;
export type HoldGauge = (typeof HOLD_GAUGES)[number];

/** The smallest step that a kind of gauge can be read to, in its own unit. Common practice, no source. */
export const USUAL_STEP: Record<HoldGauge, string> = { micron: '1', mbar: '1', inHg: '0.5' };

const MOST_LINES = 2000;

/** A reading of a vacuum gauge as absolute pressure in Pa; inches of mercury count down from the air outside. */
export function absolutePa(value: number, gauge: HoldGauge, altitudeM: number): number {
  const si = toSi(value, gauge);
  return gauge === 'inHg' ? airPressurePa(altitudeM) + si : si;
}

/** A step of a gauge in Pa. */
export function stepPa(step: number, gauge: HoldGauge): number {
  return Math.abs(toSi(step, gauge));
}

/** Lines of minutes and reading, apart by space, comma, semicolon or tab; the first wrong line is named. */
export function parseSamples(
  text: string,
  gauge: HoldGauge,
  altitudeM: number,
): { samples: Sample[] } | { error: string } {
  const lines = text.split('\n').map((line) => line.trim());
  const samples: Sample[] = [];
  for (const [place, line] of lines.entries()) {
    if (line === '') continue;
    const parts = line.split(/\s*[;\t]\s*|\s+|,(?=\s)/).filter(Boolean);
    const [minutes, reading] = parts.map((part) => parseTypedNumber(part));
    if (parts.length !== 2 || minutes == null || reading == null || minutes < 0) {
      return { error: `Line ${place + 1}: write the minutes, a space, and the reading.` };
    }
    const pressurePa = absolutePa(reading, gauge, altitudeM);
    if (pressurePa < -500 || pressurePa > 115_000)
      return { error: `Line ${place + 1}: the gauge cannot read that here.` };
    samples.push({ minutes, pressurePa: Math.max(pressurePa, 0) });
    if (samples.length > MOST_LINES)
      return { error: `Use at most ${MOST_LINES.toLocaleString('en-GB')} lines.` };
  }
  return { samples };
}

export type HoldInput = {
  samples: string;
  gauge: HoldGauge;
  step: number;
  litres: number;
  ambientC: number;
  altitudeM: number;
};

/** What a hold test's form says, as the analysis takes it. */
export function holdTestOf(input: HoldInput): HoldTest | { error: string } {
  const parsed = parseSamples(input.samples, input.gauge, input.altitudeM);
  if ('error' in parsed) return parsed;
  return {
    samples: parsed.samples,
    resolutionPa: stepPa(input.step, input.gauge),
    volumeM3: input.litres / 1000,
    ambientC: input.ambientC,
    altitudeM: input.altitudeM,
  };
}
