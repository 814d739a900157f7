import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { Certainty, ChargeKind, MethodOutcome, ProofVerdict } from '#app/domain/chain/evidence.ts';
import { id, moment, real, realOrNull, ref, refOrNull, text, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class Reading extends Model<InferAttributes<Reading>, InferCreationAttributes<Reading>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare kind: CreationOptional<string>;
  declare entered: CreationOptional<string>;
  declare unit: CreationOptional<string>;
  declare valueSi: number;
  declare takenAt: Date;
  declare note: CreationOptional<string>;
  declare photoId: CreationOptional<number | null>;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

Reading.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    kind: word(60),
    entered: word(60),
    unit: word(60),
    valueSi: real(),
    takenAt: moment(),
    note: text(),
    photoId: refOrNull(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'readings' },
);

export class TraceMethod extends Model<InferAttributes<TraceMethod>, InferCreationAttributes<TraceMethod>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare methodId: CreationOptional<string>;
  declare outcome: MethodOutcome;
  declare note: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

TraceMethod.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    methodId: word(60),
    outcome: word(20, undefined),
    note: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'trace_methods' },
);

export class Finding extends Model<InferAttributes<Finding>, InferCreationAttributes<Finding>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare componentId: CreationOptional<string>;
  declare failureModeId: CreationOptional<string>;
  declare mechanismId: CreationOptional<string>;
  declare causeId: CreationOptional<string>;
  declare place: CreationOptional<string>;
  declare why: CreationOptional<string>;
  declare certainty: Certainty;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

Finding.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    componentId: word(60),
    failureModeId: word(60),
    mechanismId: word(60),
    causeId: word(60),
    place: text(),
    why: text(),
    certainty: word(20, undefined),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'findings' },
);

export class RepairAction extends Model<
  InferAttributes<RepairAction>,
  InferCreationAttributes<RepairAction>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare actionId: CreationOptional<string>;
  declare componentId: CreationOptional<string>;
  declare partNumber: CreationOptional<string>;
  declare because: 'failed' | 'opened';
  declare note: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

RepairAction.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    actionId: word(60),
    componentId: word(60),
    partNumber: word(),
    because: word(20, undefined),
    note: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'repair_actions' },
);

export class Proof extends Model<InferAttributes<Proof>, InferCreationAttributes<Proof>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare method: CreationOptional<string>;
  declare verdict: ProofVerdict;
  declare minutes: CreationOptional<number | null>;
  declare startEntered: CreationOptional<string>;
  declare endEntered: CreationOptional<string>;
  declare unit: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

Proof.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    method: word(),
    verdict: word(20, undefined),
    minutes: realOrNull(),
    startEntered: word(60),
    endEntered: word(60),
    unit: word(60),
    note: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'proofs' },
);

export class Charge extends Model<InferAttributes<Charge>, InferCreationAttributes<Charge>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare kind: ChargeKind;
  declare substance: CreationOptional<string>;
  declare entered: CreationOptional<string>;
  declare unit: CreationOptional<string>;
  declare amountSi: number;
  declare cylinderId: CreationOptional<number | null>;
  declare source: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

Charge.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    kind: word(20, undefined),
    substance: word(),
    entered: word(60),
    unit: word(60),
    amountSi: real(),
    cylinderId: refOrNull(),
    source: word(),
    note: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'charges' },
);

export class GateOverride extends Model<
  InferAttributes<GateOverride>,
  InferCreationAttributes<GateOverride>
> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare gate: CreationOptional<string>;
  declare lacks: CreationOptional<string[]>;
  declare reason: CreationOptional<string>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

GateOverride.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    gate: word(60),
    lacks: jsonColumn('lacks', []),
    reason: text(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'gate_overrides' },
);
