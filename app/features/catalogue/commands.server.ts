import { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { slugOf } from '#app/domain/text/slug.ts';
import { CATALOGUE_KINDS, entriesFor, entry } from '#app/domain/vocabulary/vocabulary.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { done, Forbidden, type Outcome, refuseFields } from '#app/features/outcome.ts';
import { CatalogueEntry } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { shopVocabulary } from './queries.server.ts';

const names = z
  .string()
  .max(2000, 'Use at most 2,000 characters.')
  .default('')
  .transform((text) =>
    text
      .split(/[,\n]/)
      .map((name) => name.trim())
      .filter(Boolean),
  );

export const newEntrySchema = z.object({
  kind: z.enum(CATALOGUE_KINDS, { error: 'Choose what it is.' }),
  name: z
    .string({ error: 'Write its name.' })
    .trim()
    .min(2, 'Write its name.')
    .max(120, 'Use at most 120 characters.'),
  medium: z.string().max(60).default(''),
  otherNames: names,
  note: z.string().trim().max(2000, 'Use at most 2,000 characters.').default(''),
});

/** Adds a word of the shop's own; its id is made once from the name and never changes. */
export async function addCatalogueEntry(
  actor: Actor,
  input: z.infer<typeof newEntrySchema>,
  now: Date,
): Promise<Outcome> {
  if (!may(actor.role, 'catalogue:manage')) throw new Forbidden();
  const vocabulary = await shopVocabulary(actor.shopId);
  const { kind, name, medium, otherNames, note } = input;
  const needsMedium = kind === 'circuit' || kind === 'component' || kind === 'symptom';
  if (medium !== '' && !entry(vocabulary, 'medium', medium))
    return refuseFields({ medium: 'Choose a medium.' });
  if (needsMedium && medium === '') return refuseFields({ medium: 'Say for which medium.' });
  const same = entriesFor(vocabulary, kind, medium || undefined).some(
    (known) => known.name.toLowerCase() === name.toLowerCase(),
  );
  if (same) return refuseFields({ name: 'The catalogue has this already.' });
  const base = `own-${slugOf(name, 40)}`;
  return transact(async (transaction) => {
    const taken = await CatalogueEntry.count({ where: { shopId: actor.shopId, kind }, transaction });
    const entryId = entry(vocabulary, kind, base) ? `${base}-${taken + 1}` : base;
    await CatalogueEntry.create(
      {
        shopId: actor.shopId,
        kind,
        entryId,
        name,
        media: medium ? [medium] : [],
        otherNames,
        note,
        updatedAt: now,
      },
      { transaction },
    );
    await recordAudit(
      { actor, action: 'catalogue-added', subject: 'catalogue', detail: { kind, name } },
      transaction,
    );
    return done();
  });
}

export const changeEntrySchema = z.object({
  kind: z.enum(CATALOGUE_KINDS),
  id: z.string().min(1).max(60),
  otherNames: names,
  hidden: z.string().optional(),
});

/** Gives an entry further names, or hides it from choice; records that use it keep it. */
export async function changeCatalogueEntry(
  actor: Actor,
  input: z.infer<typeof changeEntrySchema>,
  now: Date,
): Promise<Outcome> {
  if (!may(actor.role, 'catalogue:manage')) throw new Forbidden();
  const vocabulary = await shopVocabulary(actor.shopId);
  const known = entry(vocabulary, input.kind, input.id);
  if (!known) return refuseFields({ '': 'The catalogue has no such entry.' });
  const hidden = input.hidden === 'yes';
  return transact(async (transaction) => {
    const where = { shopId: actor.shopId, kind: input.kind, entryId: input.id };
    const row = await CatalogueEntry.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
    const values = { otherNames: input.otherNames, hidden, updatedAt: now };
    if (row) await row.update({ ...values, version: row.version + 1 }, { transaction });
    else
      await CatalogueEntry.create(
        { ...where, name: known.name, media: [...known.media], note: '', ...values },
        { transaction },
      );
    const detail = { kind: input.kind, id: input.id, otherNames: input.otherNames, hidden };
    await recordAudit({ actor, action: 'catalogue-changed', subject: 'catalogue', detail }, transaction);
    return done();
  });
}
