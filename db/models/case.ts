import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { CaseState, ChainLink, LinkKey } from '#app/domain/chain/chain.ts';
import {
  id,
  longText,
  moment,
  momentOrNull,
  realOrNull,
  ref,
  refOrNull,
  whole,
  wholeOrNull,
  word,
  wordOrNull,
  yes,
} from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class Case extends Model<InferAttributes<Case>, InferCreationAttributes<Case>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare number: number;
  declare externalId: CreationOptional<string | null>;
  declare machineId: number;
  declare circuitId: number;
  declare yardId: CreationOptional<number | null>;
  declare medium: CreationOptional<string>;
  declare title: CreationOptional<string>;
  declare state: CaseState;
  declare chain: CreationOptional<ChainLink[]>;
  declare versions: CreationOptional<Partial<Record<LinkKey, number>>>;
  declare openedById: CreationOptional<number | null>;
  declare openedAt: Date;
  declare technicianName: CreationOptional<string>;
  declare assigneeId: CreationOptional<number | null>;
  declare severity: CreationOptional<number | null>;
  declare hours: CreationOptional<number | null>;
  declare complaint: CreationOptional<string>;
  declare weather: CreationOptional<string>;
  declare ambientC: CreationOptional<number | null>;
  declare ambientEntered: CreationOptional<string>;
  declare ambientUnit: CreationOptional<string>;
  declare readingsNote: CreationOptional<string>;
  declare traceNote: CreationOptional<string>;
  declare repairNote: CreationOptional<string>;
  declare proofNote: CreationOptional<string>;
  declare chargeNote: CreationOptional<string>;
  declare backToWorkAt: CreationOptional<Date | null>;
  declare downtimeHours: CreationOptional<number | null>;
  declare parkedReason: CreationOptional<string | null>;
  declare parkedUntil: CreationOptional<Date | null>;
  declare closedReason: CreationOptional<string | null>;
  declare imported: CreationOptional<boolean>;
  declare updatedAt: Date;
}

Case.init(
  {
    id: id(),
    shopId: ref(),
    number: whole(),
    externalId: wordOrNull(),
    machineId: ref(),
    circuitId: ref(),
    yardId: refOrNull(),
    medium: word(60),
    title: word(),
    state: word(20, 'open'),
    chain: jsonColumn('chain', []),
    versions: jsonColumn('versions', {}),
    openedById: refOrNull(),
    openedAt: moment(),
    technicianName: word(),
    assigneeId: refOrNull(),
    severity: wholeOrNull(),
    hours: wholeOrNull(),
    complaint: longText(),
    weather: word(),
    ambientC: realOrNull(),
    ambientEntered: word(60),
    ambientUnit: word(60),
    readingsNote: longText(),
    traceNote: longText(),
    repairNote: longText(),
    proofNote: longText(),
    chargeNote: longText(),
    backToWorkAt: momentOrNull(),
    downtimeHours: realOrNull(),
    parkedReason: wordOrNull(),
    parkedUntil: momentOrNull(),
    closedReason: wordOrNull(),
    imported: yes(),
    updatedAt: moment(),
  },
  { sequelize, tableName: 'cases' },
);

export class CaseSymptom extends Model<InferAttributes<CaseSymptom>, InferCreationAttributes<CaseSymptom>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare symptomId: CreationOptional<string>;
}

CaseSymptom.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    symptomId: word(60),
  },
  { sequelize, tableName: 'case_symptoms' },
);
