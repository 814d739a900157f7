import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, moment, ref, refOrNull, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: CreationOptional<number | null>;
  declare subject: CreationOptional<string>;
  declare subjectId: CreationOptional<number | null>;
  declare action: CreationOptional<string>;
  declare detail: CreationOptional<Record<string, unknown>>;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
  declare at: Date;
}

AuditEntry.init(
  {
    id: id(),
    shopId: ref(),
    caseId: refOrNull(),
    subject: word(60),
    subjectId: refOrNull(),
    action: word(60),
    detail: jsonColumn('detail', {}),
    byId: refOrNull(),
    byName: word(),
    at: moment(),
  },
  { sequelize, tableName: 'audit_entries' },
);
