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
