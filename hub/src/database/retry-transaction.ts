import type { Transaction } from 'sequelize';
import type { Sequelize } from 'sequelize-typescript';

const TRIES = 3;
const DEADLOCK = 1213;
const LOCK_WAIT_TIMEOUT = 1205;

function errnoOf(error: unknown): number | undefined {
  const cause = (error as { original?: { errno?: number }; parent?: { errno?: number } }).original ?? error;
  return (cause as { errno?: number }).errno;
}

/**
 * Runs `work` in a managed transaction and runs it again, up to three times, when MariaDB chose it as the victim of a deadlock or a
 * lock was not to be had. `work` must not have effects outside the transaction.
 */
export async function inTransaction<Result>(
  sequelize: Sequelize,
  work: (transaction: Transaction) => Promise<Result>,
): Promise<Result> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await sequelize.transaction(work);
    } catch (error) {
      const isRetryable = [DEADLOCK, LOCK_WAIT_TIMEOUT].includes(errnoOf(error) ?? 0);
      if (!isRetryable || attempt === TRIES) throw error;
      await new Promise((resolve) => setTimeout(resolve, 10 * attempt + Math.random() * 30));
    }
  }
}
