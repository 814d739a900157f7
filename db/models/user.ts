import { type CreationOptional, type InferAttributes, type InferCreationAttributes, Model } from 'sequelize';
import type { Role } from '#app/domain/permissions/actor.ts';
import type { Preferences } from '#app/domain/units/preferences.ts';
import { id, moment, momentOrNull, ref, word, wordOrNull, yes } from '../columns.ts';
import { sequelize } from '../connection.server.ts';
import { jsonColumn } from '../json-column.ts';

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare email: CreationOptional<string>;
  declare name: CreationOptional<string>;
  declare passwordHash: CreationOptional<string | null>;
  declare role: Role;
  declare active: CreationOptional<boolean>;
  declare preferences: CreationOptional<Preferences>;
  declare createdAt: Date;
  declare lastSeenAt: CreationOptional<Date | null>;
}

User.init(
  {
    id: id(),
    shopId: ref(),
    email: word(),
    name: word(),
    passwordHash: wordOrNull(),
    role: word(20, undefined),
    active: yes(true),
    preferences: jsonColumn('preferences', {}),
    createdAt: moment(),
    lastSeenAt: momentOrNull(),
  },
  { sequelize, tableName: 'users' },
);

/** What a person is certified for, and until when; without a date it does not expire. */
export class Certificate extends Model<InferAttributes<Certificate>, InferCreationAttributes<Certificate>> {
  declare id: CreationOptional<number>;
  declare shopId: number;
  declare userId: number;
  declare name: string;
  declare expiresOn: CreationOptional<Date | null>;
}

Certificate.init(
  { id: id(), shopId: ref(), userId: ref(), name: word(), expiresOn: momentOrNull() },
  { sequelize, tableName: 'certificates' },
);
