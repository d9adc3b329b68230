import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { Umzug, type UmzugStorage } from 'umzug';
import { connectionOptions } from './connection-options.js';
import { migrations } from './migrations/list.js';

const LOCK_NAME = 'steepfall.migrate';
const LOCK_WAIT_S = 30;

/** Keeps what has run in a table of its own; umzug's storage for Sequelize would call `sync()`. */
const storage: UmzugStorage<Sequelize> = {
  async executed({ context }) {
    await context.query(
      `CREATE TABLE IF NOT EXISTS migrations (
        name VARCHAR(80) CHARACTER SET ascii COLLATE ascii_bin NOT NULL PRIMARY KEY,
        ran_at_ms BIGINT UNSIGNED NOT NULL
      ) ENGINE=InnoDB DEFAULT CHARSET=utf8mb4`,
      { type: QueryTypes.RAW },
    );
    const rows = await context.query<{ name: string }>('SELECT name FROM migrations ORDER BY name', {
      type: QueryTypes.SELECT,
    });
    return rows.map((row) => row.name);
  },
  async logMigration({ name, context }) {
    await context.query('INSERT INTO migrations (name, ran_at_ms) VALUES (?, ?)', {
      type: QueryTypes.INSERT,
      replacements: [name, Date.now()],
    });
  },
  unlogMigration() {
    return Promise.reject(new Error('Migrations go forwards only.'));
  },
};

/** Brings the database up to this build. Only one hub at a time does it; the others wait. Returns the names that were run. */
export async function migrateDatabase(databaseUrl: string): Promise<string[]> {
  const sequelize = new Sequelize(connectionOptions(databaseUrl));
  try {
    const umzug = new Umzug({
      migrations: migrations.map(({ name, up }) => ({ name, up: () => up(sequelize) })),
      context: sequelize,
      storage,
      logger: undefined,
    });
    // The lock belongs to a connection: the transaction keeps that one aside while the statements run on others.
    return await sequelize.transaction(async (transaction) => {
      const [lock] = await sequelize.query<{ isTaken: number | null }>('SELECT GET_LOCK(?, ?) AS isTaken', {
        type: QueryTypes.SELECT,
        replacements: [LOCK_NAME, LOCK_WAIT_S],
        transaction,
      });
      if (lock?.isTaken !== 1) throw new Error('Another hub is migrating this database and does not come to an end.');
      try {
        const done = await umzug.up();
        return done.map(({ name }) => name);
      } finally {
        await sequelize.query('SELECT RELEASE_LOCK(?)', {
          type: QueryTypes.SELECT,
          replacements: [LOCK_NAME],
          transaction,
        });
      }
    });
  } finally {
    await sequelize.close();
  }
}
