import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { WriteUpState } from '#app/domain/write-ups/write-up-state.ts';
import {
  id,
  longText,
  moment,
  momentOrNull,
  ref,
  refOrNull,
  text,
  whole,
  word,
  wordOrNull,
} from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class WriteUp extends Model<InferAttributes<WriteUp>, InferCreationAttributes<WriteUp>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare slug: CreationOptional<string>;
  declare title: CreationOptional<string>;
  declare body: CreationOptional<string>;
  declare photoIds: CreationOptional<number[]>;
  declare state: WriteUpState;
  declare authorId: CreationOptional<number | null>;
  declare authorName: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare publishedAt: CreationOptional<Date | null>;
  declare withdrawnReason: CreationOptional<string | null>;
  declare createdAt: Date;
  declare updatedAt: Date;
}

WriteUp.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    slug: word(),
    title: word(),
    body: longText(),
    photoIds: jsonColumn('photoIds', []),
    state: word(20, 'draft'),
    authorId: refOrNull(),
    authorName: word(),
    version: whole(1),
    publishedAt: momentOrNull(),
    withdrawnReason: wordOrNull(),
    createdAt: moment(),
    updatedAt: moment(),
  },
  { sequelize, tableName: 'write_ups' },
);

export class WriteUpRevision extends Model<
  InferAttributes<WriteUpRevision>,
  InferCreationAttributes<WriteUpRevision>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare writeUpId: number;
  declare number: number;
  declare title: CreationOptional<string>;
  declare body: CreationOptional<string>;
  declare photoIds: CreationOptional<number[]>;
  declare publishedAt: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

WriteUpRevision.init(
  {
    id: id(),
    shopId: ref(),
    writeUpId: ref(),
    number: whole(),
    title: word(),
    body: longText(),
    photoIds: jsonColumn('photoIds', []),
    publishedAt: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'write_up_revisions' },
);

export class WriteUpRemark extends Model<
  InferAttributes<WriteUpRemark>,
  InferCreationAttributes<WriteUpRemark>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare writeUpId: number;
  declare body: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

WriteUpRemark.init(
  {
    id: id(),
    shopId: ref(),
    writeUpId: ref(),
    body: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'write_up_remarks' },
);

export class WriteUpFlag extends Model<InferAttributes<WriteUpFlag>, InferCreationAttributes<WriteUpFlag>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare writeUpId: number;
  declare body: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
  declare answer: CreationOptional<string>;
  declare answeredAt: CreationOptional<Date | null>;
  declare answeredById: CreationOptional<number | null>;
  declare answeredByName: CreationOptional<string>;
}

WriteUpFlag.init(
  {
    id: id(),
    shopId: ref(),
    writeUpId: ref(),
    body: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
    answer: text(),
    answeredAt: momentOrNull(),
    answeredById: refOrNull(),
    answeredByName: word(),
  },
  { sequelize, tableName: 'write_up_flags' },
);
