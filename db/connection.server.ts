import { Sequelize } from 'sequelize';
import { env } from '#app/server/env.server.ts';

/** The one connection pool. Times are stored in UTC; a slow statement is the caller's fault, so nothing is logged. */
export const sequelize = new Sequelize(env.DATABASE_URL, {
  dialect: 'mariadb',
  logging: false,
  timezone: '+00:00',
  define: { timestamps: false, charset: 'utf8mb4' },
  dialectOptions: { connectTimeout: 5_000 },
  pool: { max: 10, min: 0, idle: 10_000, acquire: 20_000 },
});
