import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, moment, ref, whole, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class Shop extends Model<InferAttributes<Shop>, InferCreationAttributes<Shop>> {
  declare id: CreationOptional<number>;
  declare name: CreationOptional<string>;
  declare slug: CreationOptional<string>;
  declare createdAt: Date;
  declare nextCaseNumber: CreationOptional<number>;
}

Shop.init(
  {
    id: id(),
    name: word(),
    slug: word(60),
    createdAt: moment(),
    nextCaseNumber: whole(1001),
  },
  { sequelize, tableName: 'shops' },
);

export class Yard extends Model<InferAttributes<Yard>, InferCreationAttributes<Yard>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare name: CreationOptional<string>;
  declare altitudeM: CreationOptional<number>;
}

Yard.init(
  {
    id: id(),
    shopId: ref(),
    name: word(),
    altitudeM: whole(0),
  },
  { sequelize, tableName: 'yards' },
);
