import { z } from 'zod';
import { airPressurePa } from '#app/domain/atmosphere/atmosphere.ts';
import { analysePressureTest } from '#app/domain/hold-test/hold-test.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { fromSi, toSi, UNITS, type UnitId } from '#app/domain/units/units.ts';
import { done, type Outcome } from '#app/features/outcome.ts';
import { Proof } from '#db/models/index.ts';
import { changeCase } from './change-case.server.ts';
import { COMPUTED_PROOFS } from './computed-proofs.ts';
import { number } from './typed-number.ts';

export const PRESSURE_GAUGES = ['bar', 'psi', 'kPa'] as const;

export const pressureTestSchema = z.object({
  startPressure: number(0.01, 10_000, 'Use a gauge pressure above nothing.'),
  endPressure: number(0, 10_000, 'Use a gauge pressure of nothing or more.'),
  pressureUnit: z.enum(PRESSURE_GAUGES, { error: 'Choose the gauge.' }),
  pressureStep: number(0.0001, 1000, 'Use the smallest step you can read.'),
  startC: number(-40, 80, 'Use −40 to 80 °C.'),
  endC: number(-40, 80, 'Use −40 to 80 °C.'),
  pressureMinutes: number(1, 100_000, 'Use a minute or more.'),
  note: z.string().trim().max(20_000, 'Use at most 20,000 characters.').default(''),
});
export type PressureTestInput = z.infer<typeof pressureTestSchema>;

type Add = { actor: Actor; number: number; input: PressureTestInput; at?: Date };

/** Records a test with dry nitrogen; what cooling explains is taken out before the verdict. */
export async function addPressureTest({
  actor,
  number: caseNumber,
  input,
  at = new Date(),
}: Add): Promise<Outcome> {
  const unit: UnitId = input.pressureUnit;
  const airPa = airPressurePa(0);
  const absolute = (value: number) => toSi(value, unit) + airPa;
  const found = analysePressureTest({
    startPa: absolute(input.startPressure),
    endPa: absolute(input.endPressure),
    startC: input.startC,
    endC: input.endC,
    resolutionPa: toSi(input.pressureStep, unit),
  });
  const expected = fromSi(found.expectedPa - airPa, unit).toPrecision(4);
  const words = `From ${input.startC} to ${input.endC} °C a tight circuit would have ended at ${expected} ${UNITS[unit].label}.`;
  return changeCase({
    actor,
    number: caseNumber,
    needs: 'case:edit',
    link: 'proof',
    audit: {
      action: 'pressure-test-added',
      detail: { verdict: found.verdict, lostPa: Math.round(found.lostPa) },
    },
    at,
    async change(row, transaction) {
      await Proof.create(
        {
          shopId: row.shopId,
          caseId: row.id,
          method: COMPUTED_PROOFS.nitrogen,
          verdict: found.verdict === 'leak' ? 'not-tight' : found.verdict,
          minutes: input.pressureMinutes,
          startEntered: String(input.startPressure),
          endEntered: String(input.endPressure),
          unit,
          note: [words, input.note].filter(Boolean).join('\n'),
          at,
          byId: actor.userId,
          byName: actor.name,
        },
        { transaction },
      );
      return done();
    },
  });
}
