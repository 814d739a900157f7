import { setTimeout as pause } from 'node:timers/promises';
import { Transaction } from 'sequelize';
import { sequelize } from './connection.server.ts';

const ATTEMPTS = 4;
/** Whoever waited for a row's lock then reads what the one before wrote, not what stood when the transaction began. */
const isolationLevel = Transaction.ISOLATION_LEVELS.READ_COMMITTED;

/** Runs `work` in a transaction; a deadlock or lock time-out rolls back and tries again, so `work` must not have effects elsewhere. */
export async function transact<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await sequelize.transaction({ isolationLevel }, work);
    } catch (error) {
      if (attempt === ATTEMPTS || !isLockConflict(error)) throw error;
      await pause(15 * attempt + Math.floor(Math.random() * 40));
    }
  }
}

function isLockConflict(error: unknown): boolean {
  const parent = error instanceof Error && 'parent' in error ? error.parent : error;
  const errno = typeof parent === 'object' && parent && 'errno' in parent ? parent.errno : undefined;
  return errno === 1213 || errno === 1205 || errno === 1020;
}
