import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
} from 'sequelize';
import { id, longText, moment, real, ref, refOrNull, whole, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class SearchDocument extends Model<
  InferAttributes<SearchDocument>,
  InferCreationAttributes<SearchDocument>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare kind: 'case' | 'write-up';
  declare caseId: number;
  declare number: number;
  declare medium: CreationOptional<string>;
  declare machineId: CreationOptional<number | null>;
  declare yardId: CreationOptional<number | null>;
  declare state: CreationOptional<string>;
  declare openedAt: Date;
  declare componentIds: CreationOptional<string[]>;
  declare failureModeIds: CreationOptional<string[]>;
  declare methodIds: CreationOptional<string[]>;
  declare title: CreationOptional<string>;
  declare body: CreationOptional<string>;
  declare prepared: CreationOptional<string>;
  declare vector: CreationOptional<[string, number][]>;
  declare length: number;
  declare indexedAt: Date;
}

SearchDocument.init(
  {
    id: id(),
    shopId: ref(),
    kind: word(20, undefined),
    caseId: ref(),
    number: whole(),
    medium: word(60),
    machineId: refOrNull(),
    yardId: refOrNull(),
    state: word(60),
    openedAt: moment(),
    componentIds: jsonColumn('componentIds', []),
    failureModeIds: jsonColumn('failureModeIds', []),
    methodIds: jsonColumn('methodIds', []),
    title: word(),
    body: longText(),
    prepared: longText(),
    vector: jsonColumn('vector', []),
    length: real(),
    indexedAt: moment(),
  },
  { sequelize, tableName: 'search_documents' },
);

export class SearchTerm extends Model<InferAttributes<SearchTerm>, InferCreationAttributes<SearchTerm>> {
  declare shopId: number;
  declare term: string;
  declare documentId: number;
  declare weight: number;
}

SearchTerm.init(
  {
    shopId: { type: DataTypes.INTEGER.UNSIGNED, primaryKey: true },
    term: { type: DataTypes.STRING(60), primaryKey: true },
    documentId: { type: DataTypes.INTEGER.UNSIGNED, primaryKey: true },
    weight: real(),
  },
  { sequelize, tableName: 'search_terms' },
);
