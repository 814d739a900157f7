import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import { id, longText, real, ref, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class HoldTest extends Model<InferAttributes<HoldTest>, InferCreationAttributes<HoldTest>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare caseId: number;
  declare proofId: number;
  declare samples: string;
  declare gauge: string;
  declare step: number;
  declare litres: number;
  declare ambientC: number;
  declare altitudeM: number;
  declare refrigerant: string;
  declare verdict: string;
}

HoldTest.init(
  {
    id: id(),
    shopId: ref(),
    caseId: ref(),
    proofId: ref(),
    samples: longText(),
    gauge: word(20),
    step: real(),
    litres: real(),
    ambientC: real(),
    altitudeM: real(),
    refrigerant: word(20),
    verdict: word(20),
  },
  { sequelize, tableName: 'hold_tests' },
);
