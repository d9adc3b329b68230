import { QueryTypes, type Transaction } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { newId } from '../common/ids.js';
import { connectionOptions } from '../database/connection-options.js';
import { demoHouse, demoSignIns } from './demo-house.js';
import { demoTables, localDate, plannedBatch, type Row } from './demo-rows.js';

/** Rows in one statement: below the packet size of any server. */
const ROWS_A_STATEMENT = 1000;

/**
 * Sees to it that the demo house is there, with a batch to brew today. What was done in it stays. The rows are written to the tables as a
 * migration would: no feature has to know that there is such a house.
 */
export async function ensureDemo(databaseUrl: string, nowMs: number): Promise<'made' | 'kept'> {
  return onDatabase(databaseUrl, async (sequelize, transaction) => {
    if (await exists(sequelize, transaction)) {
      await planToday(sequelize, transaction, nowMs);
      return 'kept';
    }
    await make(sequelize, transaction, nowMs);
    return 'made';
  });
}

/** Throws the demo house away with all that was done in it, and makes it anew. Other houses are not touched. */
export async function resetDemo(databaseUrl: string, nowMs: number): Promise<void> {
  await onDatabase(databaseUrl, async (sequelize, transaction) => {
    await remove(sequelize, transaction);
    await make(sequelize, transaction, nowMs);
  });
}

async function onDatabase<Result>(
  databaseUrl: string,
  work: (sequelize: Sequelize, transaction: Transaction) => Promise<Result>,
): Promise<Result> {
  const sequelize = new Sequelize(connectionOptions(databaseUrl));
  try {
    return await sequelize.transaction((transaction) => work(sequelize, transaction));
  } finally {
    await sequelize.close();
  }
}

async function exists(sequelize: Sequelize, transaction: Transaction): Promise<boolean> {
  const found = await sequelize.query('SELECT id FROM houses WHERE id = ?', {
    type: QueryTypes.SELECT,
    replacements: [demoHouse.id],
    transaction,
  });
  return found.length > 0;
}

async function make(sequelize: Sequelize, transaction: Transaction, nowMs: number): Promise<void> {
  for (const [table, rows] of await demoTables(nowMs)) await insert(sequelize, transaction, table, rows);
}

async function insert(sequelize: Sequelize, transaction: Transaction, table: string, rows: Row[]): Promise<void> {
  for (let first = 0; first < rows.length; first += ROWS_A_STATEMENT)
    await sequelize.getQueryInterface().bulkInsert(table, rows.slice(first, first + ROWS_A_STATEMENT), { transaction });
}

/** A batch that was planned and not begun moves to today; when all were begun, the next one is planned. */
async function planToday(sequelize: Sequelize, transaction: Transaction, nowMs: number): Promise<void> {
  const today = localDate(nowMs);
  const waiting = await sequelize.query<{ id: string; plannedOn: string }>(
    `SELECT batches.id AS id, CAST(batches.planned_on AS CHAR) AS plannedOn FROM batches
     LEFT JOIN runs ON runs.batch_id = batches.id
     WHERE batches.house_id = ? AND runs.id IS NULL AND batches.cancelled_at_ms IS NULL
     ORDER BY batches.planned_on DESC LIMIT 1`,
    { type: QueryTypes.SELECT, replacements: [demoHouse.id], transaction },
  );
  const [batch] = waiting;
  if (batch && batch.plannedOn >= today) return;
  if (batch) {
    await sequelize.query('UPDATE batches SET planned_on = ? WHERE id = ?', {
      type: QueryTypes.UPDATE,
      replacements: [today, batch.id],
      transaction,
    });
    return;
  }
  const [last] = await sequelize.query<{ number: number | null }>(
    'SELECT MAX(number_in_year) AS number FROM batches WHERE house_id = ? AND year = ?',
    { type: QueryTypes.SELECT, replacements: [demoHouse.id, Number(today.slice(0, 4))], transaction },
  );
  await insert(sequelize, transaction, 'batches', [plannedBatch(newId(), nowMs, (last?.number ?? 0) + 1)]);
}

/** Children before parents. */
const removals = [
  'DELETE run_events FROM run_events JOIN runs ON runs.id = run_events.run_id WHERE runs.house_id = :houseId',
  'DELETE readings FROM readings JOIN probes ON probes.id = readings.probe_id WHERE probes.house_id = :houseId',
  // Lines that take another one back come before it.
  'DELETE FROM lot_moves WHERE house_id = :houseId AND undoes_id IS NOT NULL',
  ...[
    'follow_links',
    'runs',
    'lot_reservations',
    'lot_moves',
    'lots',
    'ingredients',
    'attachments',
    'batches',
    'recipe_revisions',
    'recipes',
    'probes',
    'equipment',
    'audit_log',
    'sessions',
    'memberships',
  ].map((table) => `DELETE FROM ${table} WHERE house_id = :houseId`),
  'DELETE FROM houses WHERE id = :houseId',
  `DELETE FROM users WHERE email IN (:emails)
   AND NOT EXISTS (SELECT 1 FROM memberships WHERE memberships.user_id = users.id)`,
];

async function remove(sequelize: Sequelize, transaction: Transaction): Promise<void> {
  const replacements = { houseId: demoHouse.id, emails: demoSignIns.map(({ email }) => email) };
  for (const statement of removals)
    await sequelize.query(statement, { type: QueryTypes.DELETE, replacements, transaction });
}
