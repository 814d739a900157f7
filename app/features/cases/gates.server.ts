import type { Transaction } from 'sequelize';
import { provedTight } from '#app/domain/chain/chain.ts';
import { type ChargeStep, chargeGates, evacuationGates, type Gate } from '#app/domain/gates/gates.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { isUnit, parseTypedNumber, toSi, UNITS } from '#app/domain/units/units.ts';
import { Forbidden, type Refusal } from '#app/features/outcome.ts';
import { type Case, Circuit, GateOverride } from '#db/models/index.ts';
import { caseRecord, type Evidence, loadEvidence } from './evidence.server.ts';
import { readingsSpeak } from './readings-speak.server.ts';
import type { EntryInput } from './schema.ts';

/** What stands against this charge entry; taking out and "no fluid needed" are always allowed. */
export async function gatesBeforeCharge(
  row: Case,
  input: EntryInput<'charge'>,
  transaction: Transaction,
  exceptEntryId = 0,
): Promise<Gate[]> {
  if (input.kind !== 'charged') return [];
  const evidence = await loadEvidence(row.id, transaction);
  const circuit = await Circuit.findByPk(row.circuitId, { transaction, rejectOnEmpty: true });
  const record = caseRecord(row, evidence);
  const number = parseTypedNumber(input.value);
  const isMass = isUnit(input.unit) && UNITS[input.unit].quantity === 'mass';
  const step: ChargeStep = {
    medium: row.medium,
    provedTight: provedTight(record),
    proofLacks: proofLacks(evidence),
    grams: number !== null && isMass && isUnit(input.unit) ? toSi(number, input.unit) * 1000 : null,
    sinceRecoveryGrams: chargedSinceRecovery({
      charges: evidence.charges.filter(({ id }) => id !== exceptEntryId),
    }),
    plateGrams: circuit.plateChargeGrams,
  };
  return chargeGates(step);
}

function proofLacks({ proofs, repairs }: Evidence): string[] {
  const newest = proofs.at(-1);
  if (!newest) return ['there is no proof'];
  if (newest.verdict !== 'tight') return ['the newest proof does not say tight'];
  const repair = repairs.at(-1);
  return repair && repair.at > newest.at ? ['the newest proof is older than the newest repair'] : [];
}

/** Grams put in since the newest recovery of the case. */
export function chargedSinceRecovery({ charges }: Pick<Evidence, 'charges'>): number {
  const recovered = charges.findLastIndex(({ kind }) => kind === 'recovered');
  return charges
    .slice(recovered + 1)
    .filter(({ kind, unit }) => kind === 'charged' && isUnit(unit) && UNITS[unit].quantity === 'mass')
    .reduce((sum, { amountSi }) => sum + amountSi * 1000, 0);
}

/** What stands against pulling a vacuum on the case's circuit. */
export async function gatesBeforeEvacuation(row: Case, transaction: Transaction): Promise<Gate[]> {
  const evidence = await loadEvidence(row.id, transaction);
  const { standing } = await readingsSpeak(row, evidence, transaction);
  return evacuationGates({
    medium: row.medium,
    refrigerantInside: standing && 'verdict' in standing ? standing.verdict !== 'empty' : null,
    recovered: evidence.charges.some(({ kind }) => kind === 'recovered'),
  });
}

type Pass = { actor: Actor; row: Case; gates: Gate[]; override: string; at: Date };

/** Lets a step through, or refuses it; a lead's written reason overrides and stays on the record. */
export async function passGates(
  { actor, row, gates, override, at }: Pass,
  transaction: Transaction,
): Promise<({ ok: false } & Refusal) | null> {
  const [first] = gates;
  if (!first) return null;
  if (override === '') {
    const { gate } = first;
    return {
      ok: false,
      refused: 'gate',
      gate,
      rule: gates.map(({ rule }) => rule).join(' '),
      lacks: gates.flatMap(({ lacks }) => lacks),
    };
  }
  if (!may(actor.role, 'gate:override')) throw new Forbidden();
  for (const { gate, lacks } of gates) {
    await GateOverride.create(
      {
        shopId: row.shopId,
        caseId: row.id,
        gate,
        lacks,
        reason: override,
        at,
        byId: actor.userId,
        byName: actor.name,
      },
      { transaction },
    );
  }
  return null;
}
