import type { Transaction } from 'sequelize';
import { z } from 'zod';
import { airPressurePa } from '#app/domain/atmosphere/atmosphere.ts';
import {
  analyseGasTest,
  analyseLiquidTest,
  analyseRamTest,
  type PressureVerdict,
} from '#app/domain/hold-test/pressure-test.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { fromSi, parseTypedNumber, toSi, UNITS, type UnitId } from '#app/domain/units/units.ts';
import { done, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { type Case, Proof, Yard } from '#db/models/index.ts';
import { changeCase } from './change-case.server.ts';
import { COMPUTED_PROOFS, type PressureTestKind, pressureTestFor } from './computed-proofs.ts';
import { celsius, number, TEMPERATURE_UNITS, typedNumber, unitOf } from './typed-number.ts';

const note = z.string().trim().max(20_000, 'Use at most 20,000 characters.').default('');
const minutes = number(1, 100_000, 'Use a minute or more.');
const WARM = 'Use −40 to 176.';

export const gaugeTestSchema = z.object({
  startPressure: typedNumber(0.01, 10_000, 'Use a gauge pressure above nothing.'),
  endPressure: typedNumber(0, 10_000, 'Use a gauge pressure of nothing or more.'),
  pressureUnit: z.enum(['bar', 'psi', 'kPa'], { error: 'Choose the gauge.' }),
  pressureStep: number(0.0001, 1000, 'Use the smallest step you can read.'),
  startTemperature: number(-40, 176, WARM),
  startTemperatureUnit: unitOf(TEMPERATURE_UNITS),
  endTemperature: number(-40, 176, WARM),
  endTemperatureUnit: unitOf(TEMPERATURE_UNITS),
  litres: z
    .string()
    .trim()
    .default('')
    .refine(
      (typed) => typed === '' || (parseTypedNumber(typed) ?? 0) > 0,
      'Write the litres, or leave it empty.',
    ),
  pressureMinutes: minutes,
  note,
});
export type GaugeTestInput = z.infer<typeof gaugeTestSchema>;

export const ramTestSchema = z
  .object({
    bore: number(1, 2000, 'Use 1 to 2,000.'),
    rod: number(0, 2000, 'Use nothing to 2,000.'),
    column: number(1, 20_000, 'Use 1 to 20,000.'),
    drift: typedNumber(0, 20_000, 'Use nothing or more.'),
    driftStep: number(0.01, 100, 'Use 0.01 to 100.'),
    lengthUnit: z.enum(['mm', 'in'], { error: 'Choose a unit.' }),
    startTemperature: number(-40, 250, 'Use −40 to 250.'),
    startTemperatureUnit: unitOf(TEMPERATURE_UNITS),
    endTemperature: number(-40, 250, 'Use −40 to 250.'),
    endTemperatureUnit: unitOf(TEMPERATURE_UNITS),
    pressureMinutes: minutes,
    note,
  })
  .refine(({ bore, rod }) => rod < bore, { path: ['rod'], message: 'The rod is thinner than the bore.' });
export type RamTestInput = z.infer<typeof ramTestSchema>;

export type PressureTestInput = GaugeTestInput | RamTestInput;

type Worked = {
  verdict: PressureVerdict;
  words: string;
  startEntered: string;
  endEntered: string;
  unit: string;
};

type Add = { actor: Actor; number: number; input: PressureTestInput; at?: Date };

/** Records the pressure test of the case's medium; its verdict is worked out, not chosen. */
export async function addPressureTest({
  actor,
  number: caseNumber,
  input,
  at = new Date(),
}: Add): Promise<Outcome> {
  const detail: Record<string, unknown> = {};
  return changeCase({
    actor,
    number: caseNumber,
    needs: 'case:edit',
    link: 'proof',
    audit: { action: 'pressure-test-added', detail },
    at,
    async change(row, transaction) {
      const kind = pressureTestFor(row.medium);
      if (kind === null || (kind === 'ram') !== 'bore' in input) {
        return refuseFields({ '': 'This medium is not proved in this way.' });
      }
      const worked =
        'bore' in input ? ramWords(input) : gaugeWords(input, kind, await altitudeOf(row, transaction));
      Object.assign(detail, { verdict: worked.verdict, kind });
      const { verdict, words, ...entered } = worked;
      await Proof.create(
        {
          ...entered,
          shopId: row.shopId,
          caseId: row.id,
          method: COMPUTED_PROOFS[kind],
          verdict: verdict === 'leak' ? 'not-tight' : verdict,
          minutes: input.pressureMinutes,
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

async function altitudeOf({ yardId }: Case, transaction: Transaction): Promise<number> {
  return yardId === null ? 0 : ((await Yard.findByPk(yardId, { transaction }))?.altitudeM ?? 0);
}

function gaugeWords(input: GaugeTestInput, kind: PressureTestKind, altitudeM: number): Worked {
  const unit: UnitId = input.pressureUnit;
  const airPa = airPressurePa(altitudeM);
  const absolute = (typed: string) => toSi(parseTypedNumber(typed) ?? 0, unit) + airPa;
  const inUnit = (pascals: number) =>
    `${Number((pascals / UNITS[unit].factor).toPrecision(3))} ${UNITS[unit].label}`;
  const test = {
    startPa: absolute(input.startPressure),
    endPa: absolute(input.endPressure),
    startC: celsius(input.startTemperature, input.startTemperatureUnit),
    endC: celsius(input.endTemperature, input.endTemperatureUnit),
    resolutionPa: toSi(input.pressureStep, unit),
  };
  const entered = { startEntered: input.startPressure, endEntered: input.endPressure, unit };
  if (kind === 'kit') {
    const { verdict, steady } = analyseLiquidTest(test);
    const words = steady
      ? `A fall of up to ${inUnit(2 * test.resolutionPa)} cannot be seen on this gauge.`
      : 'The liquid did not keep its temperature, so the gauge tells nothing. Repeat it cold, or hot, at both ends.';
    return { verdict, words, ...entered };
  }
  const litres = parseTypedNumber(input.litres);
  const found = analyseGasTest({
    ...test,
    minutes: input.pressureMinutes,
    volumeM3: litres === null ? null : litres / 1000,
  });
  const expected = fromSi(found.expectedPa - airPa, unit).toPrecision(4);
  const words = [
    `From ${written(input, 'start')} to ${written(input, 'end')} a tight circuit would have ended at ${expected} ${UNITS[unit].label}.`,
    found.verdict === 'leak' &&
      `It lost ${inUnit(found.lostPaPerMinute)} a minute${found.freeAirM3PerMinute === null ? '' : `, about ${Number((found.freeAirM3PerMinute * 1000).toPrecision(2))} litres of free air a minute`}.`,
    `The smallest loss that could be seen: ${inUnit(found.smallestPaPerMinute)} a minute.`,
  ];
  return { verdict: found.verdict, words: words.filter(Boolean).join(' '), ...entered };
}

function written(
  input: Pick<
    GaugeTestInput,
    'startTemperature' | 'startTemperatureUnit' | 'endTemperature' | 'endTemperatureUnit'
  >,
  end: 'start' | 'end',
): string {
  return `${input[`${end}Temperature`]} ${UNITS[input[`${end}TemperatureUnit`]].label}`;
}

function ramWords(input: RamTestInput): Worked {
  const { lengthUnit: unit } = input;
  const metres = (value: number) => toSi(value, unit);
  const found = analyseRamTest({
    boreM: metres(input.bore),
    rodM: metres(input.rod),
    driftM: metres(parseTypedNumber(input.drift) ?? 0),
    stepM: metres(input.driftStep),
    columnM: metres(input.column),
    cooledK:
      celsius(input.startTemperature, input.startTemperatureUnit) -
      celsius(input.endTemperature, input.endTemperatureUnit),
    minutes: input.pressureMinutes,
  });
  const millilitres = (cubicMetres: number) => `${Number((cubicMetres * 1e6).toPrecision(2))} ml a minute`;
  const label = UNITS[unit].label;
  const words = [
    `The load crept ${input.drift} ${label} on a bore of ${input.bore} ${label}; the oil went from ${written(input, 'start')} to ${written(input, 'end')}, which explains ${fromSi(Math.abs(found.cooledM), unit).toPrecision(2)} ${label} ${found.cooledM < 0 ? 'the other way' : 'of it'}.`,
    found.verdict === 'leak' &&
      `The rest is ${millilitres(found.lostM3PerMinute)} past a valve or seal, or out of a hose.`,
    `The smallest that could be seen: ${millilitres(found.smallestM3PerMinute)}.`,
  ];
  return {
    verdict: found.verdict,
    words: words.filter(Boolean).join(' '),
    startEntered: '',
    endEntered: '',
    unit: '',
  };
}
