import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, moment, ref, text, whole, word, yes } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class CatalogueEntry extends Model<
  InferAttributes<CatalogueEntry>,
  InferCreationAttributes<CatalogueEntry>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare kind: CreationOptional<string>;
  declare entryId: CreationOptional<string>;
  declare name: CreationOptional<string>;
  declare media: CreationOptional<string[]>;
  declare otherNames: CreationOptional<string[]>;
  declare note: CreationOptional<string>;
  declare hidden: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare updatedAt: Date;
}

CatalogueEntry.init(
  {
    id: id(),
    shopId: ref(),
    kind: word(60),
    entryId: word(60),
    name: word(),
    media: jsonColumn('media', []),
    otherNames: jsonColumn('otherNames', []),
    note: text(),
    hidden: yes(),
    version: whole(1),
    updatedAt: moment(),
  },
  { sequelize, tableName: 'catalogue_entries' },
);
