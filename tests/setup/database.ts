import { createConnection } from 'mariadb';
import { afterAll, beforeAll } from 'vitest';

/** One database a worker, migrated once and emptied before each file. Set before anything reads the environment. */
const url = new URL(process.env.TEST_DATABASE_URL ?? '');
const name = `weepmark_test_${process.env.VITEST_POOL_ID ?? '1'}`;
const workerUrl = new URL(url);
workerUrl.pathname = `/${name}`;
process.env.DATABASE_URL = workerUrl.href;

beforeAll(async () => {
  const connection = await createConnection({
    host: url.hostname,
    port: Number(url.port),
    user: url.username,
    password: url.password,
  });
  await connection.query(
    `CREATE DATABASE IF NOT EXISTS ${name} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`,
  );
  await connection.end();
  const { sequelize } = await import('#db/connection.server.ts');
  const { migrate } = await import('#db/migrations.ts');
  await migrate(sequelize);
  await emptyTables();
});

afterAll(async () => {
  const { closeImagePool } = await import('#storage/images.server.ts');
  await closeImagePool();
  const { sequelize } = await import('#db/connection.server.ts');
  await sequelize.close();
});

async function emptyTables(): Promise<void> {
  const { sequelize } = await import('#db/connection.server.ts');
  const tables = (await sequelize.getQueryInterface().showAllTables()) as (string | { tableName: string })[];
  await sequelize.transaction(async (transaction) => {
    await sequelize.query('SET FOREIGN_KEY_CHECKS = 0', { transaction });
    for (const table of tables) {
      const tableName = typeof table === 'string' ? table : table.tableName;
      if (tableName !== 'migrations') await sequelize.query(`DELETE FROM ${tableName}`, { transaction });
    }
    await sequelize.query('SET FOREIGN_KEY_CHECKS = 1', { transaction });
  });
}
