import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, moment, momentOrNull, ref, refOrNull, text, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class Comment extends Model<InferAttributes<Comment>, InferCreationAttributes<Comment>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
  declare body: CreationOptional<string>;
  declare at: Date;
  declare deletedAt: CreationOptional<Date | null>;
}

Comment.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    byId: refOrNull(),
    byName: word(),
    body: text(),
    at: moment(),
    deletedAt: momentOrNull(),
  },
  { sequelize, tableName: 'comments' },
);

export class SameOnMine extends Model<InferAttributes<SameOnMine>, InferCreationAttributes<SameOnMine>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare machineId: number;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare at: Date;
}

SameOnMine.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    machineId: ref(),
    byId: refOrNull(),
    byName: word(),
    note: text(),
    at: moment(),
  },
  { sequelize, tableName: 'same_on_mine' },
);

export class Likeness extends Model<InferAttributes<Likeness>, InferCreationAttributes<Likeness>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare otherCaseId: number;
  declare verdict: 'confirmed' | 'dismissed';
  declare byId: CreationOptional<number | null>;
  declare at: Date;
}

Likeness.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    otherCaseId: ref(),
    verdict: word(20, undefined),
    byId: refOrNull(),
    at: moment(),
  },
  { sequelize, tableName: 'likenesses' },
);

export class SharedReport extends Model<
  InferAttributes<SharedReport>,
  InferCreationAttributes<SharedReport>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare tokenHash: string;
  declare photoIds: CreationOptional<number[]>;
  declare createdById: CreationOptional<number | null>;
  declare createdAt: Date;
  declare expiresAt: Date;
  declare revokedAt: CreationOptional<Date | null>;
}

SharedReport.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    tokenHash: word(64, undefined),
    photoIds: jsonColumn('photoIds', []),
    createdById: refOrNull(),
    createdAt: moment(),
    expiresAt: moment(),
    revokedAt: momentOrNull(),
  },
  { sequelize, tableName: 'shared_reports' },
);
