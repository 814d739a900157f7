import type { Transaction } from 'sequelize';
import {
  baseVocabulary,
  type CatalogueKind,
  extendVocabulary,
  type Vocabulary,
} from '#app/domain/vocabulary/vocabulary.ts';
import { CatalogueEntry } from '#db/models/index.ts';

/** The trade's vocabulary with the shop's own additions. */
export async function shopVocabulary(shopId: number, transaction?: Transaction): Promise<Vocabulary> {
  const rows = await CatalogueEntry.findAll({ where: { shopId }, order: [['id', 'ASC']], transaction });
  if (rows.length === 0) return baseVocabulary;
  return extendVocabulary(
    baseVocabulary,
    rows.map(({ kind, entryId, name, media, otherNames, note, hidden }) => ({
      kind: kind as CatalogueKind,
      id: entryId,
      name,
      media,
      otherNames,
      note,
      hidden,
    })),
  );
}

/** A kind of the catalogue as the admin sees it: hidden entries too, with the shop's own further names apart. */
export async function listCatalogue(shopId: number, kind: CatalogueKind) {
  const vocabulary = await shopVocabulary(shopId);
  const rows = await CatalogueEntry.findAll({ where: { shopId, kind } });
  const own = new Map(rows.map((row) => [row.entryId, row]));
  return [...(vocabulary.get(kind)?.values() ?? [])].map(
    ({ id, name, media, otherNames, note, own: isOwn, hidden }) => ({
      id,
      name,
      media: [...media],
      note,
      hidden,
      isOwn,
      otherNames:
        baseVocabulary.get(kind)?.get(id)?.otherNames.join(', ') ?? (isOwn ? '' : otherNames.join(', ')),
      ownNames: own.get(id)?.otherNames.join(', ') ?? '',
    }),
  );
}
