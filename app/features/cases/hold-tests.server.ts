import { z } from 'zod';
import { HIGHEST_M, LOWEST_M } from '#app/domain/atmosphere/atmosphere.ts';
import type { ProofVerdict } from '#app/domain/chain/evidence.ts';
import {
  analyseHoldTest,
  FEWEST_SAMPLES,
  type HoldAnalysis,
  type HoldVerdict,
  type HoldTest as Test,
} from '#app/domain/hold-test/hold-test.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { refrigerantNamed } from '#app/domain/refrigerant/saturation.ts';
import { toSi } from '#app/domain/units/units.ts';
import { done, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { HOLD_GAUGES, type HoldGauge, holdTestOf } from '#app/features/reference/hold-input.ts';
import { type Case, Circuit, HoldTest, Proof } from '#db/models/index.ts';
import { changeCase } from './change-case.server.ts';
import { COMPUTED_PROOFS } from './computed-proofs.ts';
import { gatesBeforeEvacuation, passGates } from './gates.server.ts';
import { ALTITUDE_UNITS, celsius, number, TEMPERATURE_UNITS, unitOf } from './typed-number.ts';

const holdTestForm = z.object({
  samples: z
    .string({ error: 'Write the readings.' })
    .trim()
    .min(1, 'Write the readings.')
    .max(30_000, 'Use at most 30,000 characters.'),
  gauge: z.enum(HOLD_GAUGES, { error: 'Choose the gauge.' }),
  step: number(0.001, 1000, 'Use 0.001 to 1,000.'),
  litres: number(0.01, 1000, 'Use 0.01 to 1,000 litres.'),
  ambient: number(-40, 176, 'Use −40 to 80 °C.'),
  ambientUnit: unitOf(TEMPERATURE_UNITS),
  altitude: number(-1640, 19_685, 'Use −500 to 6,000 m.'),
  altitudeUnit: unitOf(ALTITUDE_UNITS),
  note: z.string().trim().max(20_000, 'Use at most 20,000 characters.').default(''),
});

export const holdTestSchema = holdTestForm
  .transform(({ ambient, ambientUnit, altitude, altitudeUnit, ...rest }) => ({
    ...rest,
    ambient: celsius(ambient, ambientUnit),
    altitude: toSi(altitude, altitudeUnit),
  }))
  .refine(({ ambient }) => ambient <= 80, { path: ['ambient'], message: 'Use −40 to 80 °C, −40 to 176 °F.' })
  .refine(({ altitude }) => altitude >= LOWEST_M && altitude <= HIGHEST_M, {
    path: ['altitude'],
    message: 'Use −500 to 6,000 m, −1,640 to 19,685 ft.',
  });
export type HoldTestInput = z.infer<typeof holdTestSchema>;

const AS_PROOF: Record<HoldVerdict, ProofVerdict> = {
  tight: 'tight',
  leak: 'not-tight',
  'gross-leak': 'not-tight',
  moisture: 'not-tight',
  'cannot-tell': 'cannot-tell',
};

type Add = { actor: Actor; number: number; input: HoldTestInput; override: string; at?: Date };

/** Records a vacuum hold with its readings; its verdict is worked out, not chosen. */
export async function addHoldTest({
  actor,
  number: caseNumber,
  input,
  override,
  at = new Date(),
}: Add): Promise<Outcome> {
  const test = holdTestOf({ ...input, ambientC: input.ambient, altitudeM: input.altitude });
  if ('error' in test) return refuseFields({ samples: test.error });
  const analysis = analyseHoldTest(test);
  if (!analysis) return refuseFields({ samples: `Give at least ${FEWEST_SAMPLES} readings over some time.` });
  return changeCase({
    actor,
    number: caseNumber,
    needs: 'case:edit',
    link: 'proof',
    audit: { action: 'hold-test-added', detail: { verdict: analysis.verdict, gauge: input.gauge } },
    at,
    async change(row, transaction) {
      const refused = await passGates(
        { actor, row, gates: await gatesBeforeEvacuation(row, transaction), override, at },
        transaction,
      );
      if (refused) return refused;
      const circuit = await Circuit.findByPk(row.circuitId, { transaction, rejectOnEmpty: true });
      const minutes = test.samples.map((sample) => sample.minutes);
      const proof = await Proof.create(
        {
          shopId: row.shopId,
          caseId: row.id,
          method: COMPUTED_PROOFS.vacuum,
          verdict: AS_PROOF[analysis.verdict],
          minutes: Math.max(...minutes) - Math.min(...minutes),
          note: input.note,
          at,
          byId: actor.userId,
          byName: actor.name,
        },
        { transaction },
      );
      const { samples, gauge, step, litres } = input;
      await HoldTest.create(
        {
          ...{ samples, gauge, step, litres, verdict: analysis.verdict },
          shopId: row.shopId,
          caseId: row.id,
          proofId: proof.id,
          ambientC: input.ambient,
          altitudeM: input.altitude,
          refrigerant: refrigerantNamed(circuit.refrigerant) ?? 'R-134a',
        },
        { transaction },
      );
      return done();
    },
  });
}

export type ShownHoldTest = {
  id: number;
  proofId: number;
  gauge: HoldGauge;
  refrigerant: string;
  test: Test;
  analysis: HoldAnalysis;
};

/** A case's hold tests with their curves, newest first; the verdict is worked out anew from the readings each time. */
export async function listHoldTests(row: Case): Promise<ShownHoldTest[]> {
  const rows = await HoldTest.findAll({ where: { caseId: row.id }, order: [['id', 'DESC']] });
  return rows.flatMap(
    ({ id, proofId, samples, gauge: named, step, litres, ambientC, altitudeM, refrigerant }) => {
      const gauge = HOLD_GAUGES.find((name) => name === named) ?? 'micron';
      const test = holdTestOf({ samples, gauge, step, litres, ambientC, altitudeM });
      const analysis = 'error' in test ? null : analyseHoldTest(test);
      return 'error' in test || !analysis ? [] : [{ id, proofId, gauge, refrigerant, test, analysis }];
    },
  );
}
