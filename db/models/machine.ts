import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, moment, realOrNull, ref, refOrNull, text, whole, wholeOrNull, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class Machine extends Model<InferAttributes<Machine>, InferCreationAttributes<Machine>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare yardId: CreationOptional<number | null>;
  declare number: CreationOptional<string>;
  declare kind: CreationOptional<string>;
  declare make: CreationOptional<string>;
  declare model: CreationOptional<string>;
  declare serial: CreationOptional<string>;
  declare year: CreationOptional<number | null>;
  declare hours: CreationOptional<number | null>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare createdAt: Date;
  declare updatedAt: Date;
}

Machine.init(
  {
    id: id(),
    shopId: ref(),
    yardId: refOrNull(),
    number: word(60),
    kind: word(),
    make: word(),
    model: word(),
    serial: word(),
    year: wholeOrNull(),
    hours: wholeOrNull(),
    notes: text(),
    version: whole(1),
    createdAt: moment(),
    updatedAt: moment(),
  },
  { sequelize, tableName: 'machines' },
);

export class Circuit extends Model<InferAttributes<Circuit>, InferCreationAttributes<Circuit>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare machineId: number;
  declare place: CreationOptional<string>;
  declare label: CreationOptional<string>;
  declare medium: CreationOptional<string>;
  declare refrigerant: CreationOptional<string>;
  declare plateChargeGrams: CreationOptional<number | null>;
  declare plateCharge: CreationOptional<string>;
  declare plateChargeUnit: CreationOptional<string>;
  declare oil: CreationOptional<string>;
  declare metering: '' | 'expansion-valve' | 'orifice';
  declare portsText: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare createdAt: Date;
  declare updatedAt: Date;
}

Circuit.init(
  {
    id: id(),
    shopId: ref(),
    machineId: ref(),
    place: word(60),
    label: word(),
    medium: word(60),
    refrigerant: word(60),
    plateChargeGrams: realOrNull(),
    plateCharge: word(60),
    plateChargeUnit: word(60),
    oil: word(),
    metering: word(20),
    portsText: text(),
    version: whole(1),
    createdAt: moment(),
    updatedAt: moment(),
  },
  { sequelize, tableName: 'circuits' },
);
