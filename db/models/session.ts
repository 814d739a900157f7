import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
} from 'sequelize';
import { id, moment, momentOrNull, ref, whole, word } from '../columns.ts';
import { sequelize } from '../connection.server.ts';

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: string;
  declare userId: number;
  declare createdAt: Date;
  declare lastSeenAt: Date;
  declare expiresAt: Date;
  declare userAgent: CreationOptional<string>;
  declare address: CreationOptional<string>;
}

Session.init(
  {
    id: { type: DataTypes.STRING(64), primaryKey: true },
    userId: ref(),
    createdAt: moment(),
    lastSeenAt: moment(),
    expiresAt: moment(),
    userAgent: word(),
    address: word(60),
  },
  { sequelize, tableName: 'sessions' },
);

export class SignInFailure extends Model<
  InferAttributes<SignInFailure>,
  InferCreationAttributes<SignInFailure>
> {
  declare id: string;
  declare failures: CreationOptional<number>;
  declare lastAt: Date;
}

SignInFailure.init(
  {
    id: { type: DataTypes.STRING(64), primaryKey: true },
    failures: whole(0),
    lastAt: moment(),
  },
  { sequelize, tableName: 'sign_in_failures' },
);

export class AccountToken extends Model<
  InferAttributes<AccountToken>,
  InferCreationAttributes<AccountToken>
> {
  declare id: string;
  declare userId: number;
  declare purpose: 'reset' | 'join';
  declare createdAt: Date;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;
}

AccountToken.init(
  {
    id: { type: DataTypes.STRING(64), primaryKey: true },
    userId: ref(),
    purpose: word(20, undefined),
    createdAt: moment(),
    expiresAt: moment(),
    usedAt: momentOrNull(),
  },
  { sequelize, tableName: 'account_tokens' },
);

export class ApiToken extends Model<InferAttributes<ApiToken>, InferCreationAttributes<ApiToken>> {
  declare id: CreationOptional<number>;
  declare userId: number;
  declare name: CreationOptional<string>;
  declare hash: string;
  declare createdAt: Date;
  declare lastUsedAt: CreationOptional<Date | null>;
  declare expiresAt: CreationOptional<Date | null>;
  declare revokedAt: CreationOptional<Date | null>;
}

ApiToken.init(
  {
    id: id(),
    userId: ref(),
    name: word(),
    hash: word(64, undefined),
    createdAt: moment(),
    lastUsedAt: momentOrNull(),
    expiresAt: momentOrNull(),
    revokedAt: momentOrNull(),
  },
  { sequelize, tableName: 'api_tokens' },
);
