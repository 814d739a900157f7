import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { CylinderKind, MovementKind } from '#app/domain/refrigerant-book/book.ts';
import { id, moment, ref, refOrNull, text, whole, wholeOrNull, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class Cylinder extends Model<InferAttributes<Cylinder>, InferCreationAttributes<Cylinder>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare label: string;
  declare refrigerant: string;
  declare kind: CylinderKind;
  declare createdAt: Date;
}

Cylinder.init(
  { id: id(), shopId: ref(), label: word(60), refrigerant: word(20), kind: word(20), createdAt: moment() },
  { sequelize, tableName: 'cylinders' },
);

/** One entry of the book. It is never changed: a wrong one is reversed by another. */
export class Movement extends Model<InferAttributes<Movement>, InferCreationAttributes<Movement>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare kind: MovementKind;
  declare refrigerant: string;
  declare grams: number;
  /** What the scale showed, for a weighing; the movement itself is the difference from the book. */
  declare weighedGrams: CreationOptional<number | null>;
  declare fromAccount: string;
  declare toAccount: string;
  declare cylinderId: CreationOptional<number | null>;
  declare machineId: CreationOptional<number | null>;
  declare circuitId: CreationOptional<number | null>;
  declare caseId: CreationOptional<number | null>;
  declare chargeId: CreationOptional<number | null>;
  declare certificate: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare reversesId: CreationOptional<number | null>;
  declare at: Date;
  declare byId: CreationOptional<number | null>;
  declare byName: CreationOptional<string>;
}

Movement.init(
  {
    id: id(),
    shopId: ref(),
    kind: word(20),
    refrigerant: word(20),
    grams: whole(),
    weighedGrams: wholeOrNull(),
    fromAccount: word(40),
    toAccount: word(40),
    cylinderId: refOrNull(),
    machineId: refOrNull(),
    circuitId: refOrNull(),
    caseId: refOrNull(),
    chargeId: refOrNull(),
    certificate: word(),
    note: text(),
    reversesId: refOrNull(),
    at: moment(),
    byId: refOrNull(),
    byName: word(),
  },
  { sequelize, tableName: 'movements' },
);
