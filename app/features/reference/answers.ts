import { z } from 'zod';
import { airPressurePa, HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import { chargeWindow } from '#app/domain/charge/charge-window.ts';
import { analyseHoldTest, FEWEST_SAMPLES } from '#app/domain/hold-test/hold-test.ts';
import { annualizingRate, gramsLostPerYear, rollingAverageRate } from '#app/domain/leak-rate/leak-rate.ts';
import {
  gramsPerYear,
  refrigerantNamed,
  saturationAt,
  saturationTemperature,
} from '#app/domain/refrigerant/saturation.ts';
import type { FieldErrors } from '#app/features/outcome.ts';

export type Answer<T> = { ok: true; value: T } | { ok: false; fields: FieldErrors };
const refuse = (field: string, message: string) => ({ ok: false as const, fields: { [field]: message } });

const refrigerantField = z
  .string({ error: 'Name the refrigerant.' })
  .transform((text) => refrigerantNamed(text))
  .refine((name) => name !== null, 'This refrigerant is not computed here.');
const altitudeField = z.coerce
  .number({ error: 'Write the altitude in metres.' })
  .min(LOWEST_M, `Use ${LOWEST_M} m or more.`)
  .max(HIGHEST_M, `Use ${HIGHEST_M} m or less.`);
const ambientField = z.coerce
  .number({ error: 'Write the temperature in °C.' })
  .min(-50, 'Use −50 °C or more.')
  .max(80, 'Use 80 °C or less.');

export const saturationQuery = z
  .object({
    refrigerant: refrigerantField,
    temperatureC: z.coerce.number({ error: 'Write a temperature in °C.' }).optional(),
    pressurePa: z.coerce
      .number({ error: 'Write an absolute pressure in Pa.' })
      .positive('Write an absolute pressure in Pa.')
      .optional(),
  })
  .refine(({ temperatureC, pressurePa }) => (temperatureC === undefined) !== (pressurePa === undefined), {
    path: ['temperatureC'],
    message: 'Give either temperatureC or pressurePa.',
  });

/** Saturation at a temperature, or the temperatures at a pressure. */
export function answerSaturation({
  refrigerant,
  temperatureC,
  pressurePa,
}: z.infer<typeof saturationQuery>): Answer<object> {
  const name = refrigerant as string;
  if (temperatureC !== undefined) {
    const found = saturationAt(name, temperatureC);
    return 'error' in found
      ? refuse('temperatureC', found.error)
      : { ok: true, value: { refrigerant: name, temperatureC, ...found } };
  }
  const found = saturationTemperature(name, pressurePa as number);
  return 'error' in found
    ? refuse('pressurePa', found.error)
    : { ok: true, value: { refrigerant: name, pressurePa, ...found } };
}

export const holdTestBody = z.object({
  samples: z
    .array(
      z.object({ minutes: z.number().min(0).max(100_000), pressurePa: z.number().min(0).max(120_000) }),
      { error: 'Give the samples.' },
    )
    .min(FEWEST_SAMPLES, `Give at least ${FEWEST_SAMPLES} samples.`)
    .max(5000, 'Give at most 5,000 samples.'),
  resolutionPa: z
    .number({ error: 'Give the gauge’s smallest step in Pa.' })
    .positive('Give the gauge’s smallest step in Pa.')
    .max(50_000),
  volumeM3: z
    .number({ error: 'Give the circuit’s volume in m³.' })
    .positive('Give the circuit’s volume in m³.')
    .max(1, 'That is no circuit’s volume.'),
  ambientC: z.number({ error: 'Give the temperature in °C.' }).min(-50).max(80),
  altitudeM: z.number().min(LOWEST_M).max(HIGHEST_M).default(0),
  refrigerant: refrigerantField.optional(),
});

export function answerHoldTest({ refrigerant, ...body }: z.infer<typeof holdTestBody>): Answer<object> {
  const found = analyseHoldTest(body);
  if (!found) return refuse('samples', 'The samples do not span any time.');
  const { fitted: _fitted, ...value } = found;
  const grams = refrigerant
    ? { smallestLeakGramsPerYear: gramsPerYear(refrigerant, value.smallestLeakPaM3PerS) }
    : {};
  return { ok: true, value: { ...value, ...grams } };
}

export const vacuumQuery = z.object({ altitudeM: altitudeField });

export function answerVacuum({ altitudeM }: z.infer<typeof vacuumQuery>): Answer<object> {
  const airPa = airPressurePa(altitudeM);
  return {
    ok: true,
    value: { altitudeM, airPa, deepestVacuumPa: airPa, source: 'US Standard Atmosphere 1976' },
  };
}

export const leakRateBody = z.object({
  fullChargeKg: z
    .number({ error: 'Give the full charge in kg.' })
    .positive('Give the full charge in kg.')
    .max(100_000),
  additionsKg: z
    .array(z.number().min(0).max(100_000), { error: 'Give what was added, in kg.' })
    .min(1, 'Give what was added, in kg.')
    .max(500),
  daysSinceLastAddition: z
    .number({ error: 'Give the days.' })
    .positive('Give the days since it was last added to.')
    .max(36_500),
});

/** Both methods; the newest addition counts for the annualizing one. */
export function answerLeakRate({
  fullChargeKg,
  additionsKg,
  daysSinceLastAddition,
}: z.infer<typeof leakRateBody>): Answer<object> {
  const newest = additionsKg.at(-1) ?? 0;
  return {
    ok: true,
    value: {
      annualizingPercentPerYear: annualizingRate(newest, fullChargeKg, daysSinceLastAddition),
      rollingAveragePercentPerYear: rollingAverageRate(additionsKg, fullChargeKg),
      newestGramsPerYear: gramsLostPerYear(newest * 1000, daysSinceLastAddition),
      source:
        '40 CFR 82.152; it applies to appliances above the rule’s thresholds only. Local law comes first.',
    },
  };
}

export const chargeWindowQuery = z.object({ refrigerant: refrigerantField, ambientC: ambientField });

export function answerChargeWindow({
  refrigerant,
  ambientC,
}: z.infer<typeof chargeWindowQuery>): Answer<object> {
  const found = chargeWindow(refrigerant as string, ambientC);
  if ('error' in found) return refuse(refrigerant === 'R-134a' ? 'ambientC' : 'refrigerant', found.error);
  const { lowPa, highPa, source } = found;
  return {
    ok: true,
    value: { refrigerant, ambientC, lowSideGaugePa: lowPa, highSideGaugePa: highPa, source },
  };
}
