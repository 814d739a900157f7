import { logger } from '#app/server/logger.server.ts';
import { sequelize } from '#db/connection.server.ts';
import { storageAnswers } from '#storage/store.server.ts';

/** Whether database and storage answer. */
export async function checkHealth(): Promise<{ database: boolean; storage: boolean }> {
  const [database, storage] = await Promise.all([
    sequelize.authenticate().then(
      () => true,
      (error: unknown) => {
        logger.error({ err: error }, 'the database does not answer');
        return false;
      },
    ),
    storageAnswers(),
  ]);
  return { database, storage };
}
