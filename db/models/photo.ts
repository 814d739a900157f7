import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { PhotoRole } from '#app/domain/photos/photo-role.ts';
import { id, moment, momentOrNull, ref, refOrNull, text, whole, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class Photo extends Model<InferAttributes<Photo>, InferCreationAttributes<Photo>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: CreationOptional<number | null>;
  declare circuitId: CreationOptional<number | null>;
  declare link: LinkKey | '';
  declare role: PhotoRole;
  declare caption: CreationOptional<string>;
  declare position: CreationOptional<number>;
  declare objectKey: CreationOptional<string>;
  declare contentType: CreationOptional<string>;
  declare bytes: number;
  declare width: number;
  declare height: number;
  declare sha256: string;
  declare capturedAt: CreationOptional<Date | null>;
  declare capturedAtSource: 'file' | 'browser' | 'unknown';
  declare uploadedById: CreationOptional<number | null>;
  declare uploadedByName: CreationOptional<string>;
  declare uploadedAt: Date;
  declare deletedAt: CreationOptional<Date | null>;
  declare deletedById: CreationOptional<number | null>;
}

Photo.init(
  {
    id: id(),
    shopId: ref(),
    caseId: refOrNull(),
    circuitId: refOrNull(),
    link: word(20),
    role: word(20, undefined),
    caption: text(),
    position: whole(0),
    objectKey: word(),
    contentType: word(60),
    bytes: whole(),
    width: whole(),
    height: whole(),
    sha256: word(64, undefined),
    capturedAt: momentOrNull(),
    capturedAtSource: word(20, undefined),
    uploadedById: refOrNull(),
    uploadedByName: word(),
    uploadedAt: moment(),
    deletedAt: momentOrNull(),
    deletedById: refOrNull(),
  },
  { sequelize, tableName: 'photos' },
);
