import type { Model, ModelStatic, Transaction } from 'sequelize';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { done, type FieldErrors, NotFound, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { lockCylinder } from '#app/features/refrigerant-book/movements.server.ts';
import {
  type Case,
  Charge,
  Finding,
  Photo,
  Proof,
  Reading,
  RepairAction,
  TraceMethod,
} from '#db/models/index.ts';
import { changeCase } from './change-case.server.ts';
import { enterInBook, takeOutOfBook } from './charge-book.server.ts';
import { isComputedProof } from './computed-proofs.ts';
import { entryValues } from './entry-values.ts';
import { gatesBeforeCharge, passGates } from './gates.server.ts';
import { ENTRY_LINKS, type EntryInput, type EntryKind } from './schema.ts';

const MODELS: Record<EntryKind, ModelStatic<Model>> = {
  reading: Reading,
  method: TraceMethod,
  finding: Finding,
  repair: RepairAction,
  proof: Proof,
  charge: Charge,
};

const TIME_COLUMN: Record<EntryKind, string> = {
  reading: 'takenAt',
  method: 'at',
  finding: 'at',
  repair: 'at',
  proof: 'at',
  charge: 'at',
};

const NOT_NUMBERED = { byId: null, byName: '' };

type Add<K extends EntryKind> = {
  actor: Actor;
  number: number;
  kind: K;
  input: EntryInput<K>;
  at?: Date;
  /** A lead's written reason to pass a gate all the same. */
  override?: string;
};

/** Adds an entry to its link. Two people may add at once: both are kept. */
export async function addEntry<K extends EntryKind>({
  actor,
  number,
  kind,
  input,
  at,
  override = '',
}: Add<K>): Promise<Outcome<{ id: number }>> {
  const vocabulary = await shopVocabulary(actor.shopId);
  return changeCase<{ id: number }>({
    actor,
    number,
    needs: 'case:edit',
    link: ENTRY_LINKS[kind],
    audit: { action: 'entry-added', detail: { kind, ...input } },
    at,
    async change(row, transaction) {
      const { values, fields } = entryValues(kind, input, { medium: row.medium, vocabulary });
      if (Object.keys(fields).length > 0) return refuseFields(fields);
      const fault = await foreignRows(row, values, transaction);
      if (fault) return refuseFields(fault);
      const gates =
        kind === 'charge' ? await gatesBeforeCharge(row, input as EntryInput<'charge'>, transaction) : [];
      const refused = await passGates({ actor, row, gates, override, at: at ?? new Date() }, transaction);
      if (refused) return refused;
      const created = await MODELS[kind].create(
        {
          ...NOT_NUMBERED,
          ...values,
          shopId: actor.shopId,
          caseId: row.id,
          byId: actor.userId,
          byName: actor.name,
          [TIME_COLUMN[kind]]: at ?? new Date(),
        },
        { transaction },
      );
      if (created instanceof Charge) {
        const entered = await enterInBook({ actor, row, charge: created, at: at ?? new Date() }, transaction);
        if (!entered.ok) return entered;
      }
      return done({ id: created.get('id') as number });
    },
  });
}

type ChangeEntry<K extends EntryKind> = Add<K> & { entryId: number; version: number | undefined };

/** Changes an entry in place; its time and author stay, the change is in the history. */
export async function changeEntry<K extends EntryKind>(options: ChangeEntry<K>): Promise<Outcome> {
  const { actor, number, kind, entryId, version, input, override = '' } = options;
  const vocabulary = await shopVocabulary(actor.shopId);
  return changeCase({
    actor,
    number,
    needs: 'case:edit',
    link: ENTRY_LINKS[kind],
    version,
    present: (row, transaction) => presentEntry(kind, entryId, row.id, transaction),
    audit: { action: 'entry-changed', detail: { kind, entryId, ...input } },
    async change(row, transaction) {
      const { values, fields } = entryValues(kind, input, { medium: row.medium, vocabulary });
      if (Object.keys(fields).length > 0) return refuseFields(fields);
      const found = await MODELS[kind].findOne({ where: { id: entryId, caseId: row.id }, transaction });
      if (!found) throw new NotFound();
      if (kind === 'proof' && isComputedProof(found.get('method'))) {
        const { method, verdict } = values;
        if (verdict !== found.get('verdict') || method !== found.get('method')) {
          return refuseFields({
            verdict: 'This is worked out from the readings. Record another test instead.',
          });
        }
      }
      const fault = await foreignRows(row, values, transaction);
      if (fault) return refuseFields(fault);
      const gates =
        kind === 'charge'
          ? await gatesBeforeCharge(row, input as EntryInput<'charge'>, transaction, entryId)
          : [];
      const refused = await passGates({ actor, row, gates, override, at: new Date() }, transaction);
      if (refused) return refused;
      if (!(found instanceof Charge)) {
        await found.update(values, { transaction });
        return done();
      }
      const at = new Date();
      const takenOut = await takeOutOfBook({ actor, row, charge: found, at }, transaction);
      if (!takenOut.ok) return takenOut;
      await found.update(values, { transaction });
      const entered = await enterInBook({ actor, row, charge: found, at }, transaction);
      return entered.ok ? done() : entered;
    },
  });
}

type RemoveEntry = { actor: Actor; number: number; kind: EntryKind; entryId: number };

export async function removeEntry({ actor, number, kind, entryId }: RemoveEntry): Promise<Outcome> {
  const removed: Record<string, unknown> = { kind, entryId };
  return changeCase({
    actor,
    number,
    needs: 'case:edit',
    link: ENTRY_LINKS[kind],
    audit: { action: 'entry-removed', detail: removed },
    async change(row, transaction) {
      const found = await MODELS[kind].findOne({ where: { id: entryId, caseId: row.id }, transaction });
      if (!found) throw new NotFound();
      removed.was = found.get({ plain: true });
      if (found instanceof Charge) {
        const takenOut = await takeOutOfBook({ actor, row, charge: found, at: new Date() }, transaction);
        if (!takenOut.ok) return takenOut;
      }
      await found.destroy({ transaction });
      return done();
    },
  });
}

/**
 * A reading shows a photo of its own case only; a charge names a cylinder of its own shop. The cylinder is locked here,
 * before the entry's foreign key takes a shared lock on it: two who then both want it whole would block each other.
 */
async function foreignRows(
  row: Case,
  { photoId, cylinderId }: Record<string, unknown>,
  transaction: Transaction,
): Promise<FieldErrors | null> {
  if (
    typeof photoId === 'number' &&
    !(await Photo.count({ where: { id: photoId, caseId: row.id, deletedAt: null }, transaction }))
  )
    return { photo: 'Choose a photo of this case.' };
  if (typeof cylinderId === 'number' && !(await lockCylinder(row.shopId, cylinderId, transaction)))
    return { cylinder: 'Choose a cylinder of this shop.' };
  return null;
}

async function presentEntry(
  kind: EntryKind,
  entryId: number,
  caseId: number,
  transaction: Transaction,
): Promise<Record<string, string>> {
  const found = await MODELS[kind].findOne({ where: { id: entryId, caseId }, transaction });
  if (!found) return { '': 'It was removed.' };
  const plain = found.get({ plain: true }) as Record<string, unknown>;
  const hidden = new Set([
    'id',
    'shopId',
    'caseId',
    'byId',
    'byName',
    'at',
    'takenAt',
    'valueSi',
    'amountSi',
    'photoId',
    'cylinderId',
  ]);
  return Object.fromEntries(
    Object.entries(plain)
      .filter(([name, value]) => !hidden.has(name) && value !== null && value !== '')
      .map(([name, value]) => [name, String(value)]),
  );
}
