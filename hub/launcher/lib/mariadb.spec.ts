import { createConnection } from 'mariadb';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { startMariadb } from './mariadb.mjs';
import { testDataDir } from './paths.mjs';

let folder: string;
let dataDir: string;

beforeEach(() => {
  mkdirSync(testDataDir, { recursive: true });
  folder = mkdtempSync(join(testDataDir, 'mariadb-'));
  dataDir = join(folder, 'data');
});

afterEach(() => rmSync(folder, { recursive: true, force: true }));

async function query(url: string, sql: string): Promise<unknown[]> {
  const connection = await createConnection(url);
  try {
    return Array.from((await connection.query({ sql, rowsAsArray: true, bigIntAsNumber: true })) as unknown[]);
  } finally {
    await connection.end();
  }
}

test('a server on the loopback address whose user has nothing but the databases of Steepfall', async () => {
  const mariadb = await startMariadb({ dataDir, isThrowAway: true });
  try {
    expect(mariadb.url('steepfall')).toMatch(/^mariadb:\/\/steepfall:[\w-]{32}@127\.0\.0\.1:\d+\/steepfall$/);
    await query(mariadb.url('information_schema'), 'CREATE DATABASE steepfall_test_one');
    await expect(query(mariadb.url('information_schema'), 'CREATE DATABASE other')).rejects.toThrow(/Access denied/);
    await expect(query(mariadb.url('mysql'), 'SELECT 1')).rejects.toThrow(/Access denied/);
    const [settings] = await query(
      mariadb.url('steepfall'),
      `SELECT @@bind_address, @@character_set_database, @@time_zone, @@innodb_lock_wait_timeout,
         @@innodb_flush_log_at_trx_commit, @@max_allowed_packet`,
    );
    expect(settings).toEqual(['127.0.0.1', 'utf8mb4', '+00:00', 5, 1, 64 * 1024 * 1024]);
  } finally {
    await mariadb.stop();
  }
});

test('what was committed is there after the server was killed', async () => {
  const first = await startMariadb({ dataDir, isThrowAway: true });
  await query(first.url('steepfall'), 'CREATE TABLE kept (id INT PRIMARY KEY)');
  await query(first.url('steepfall'), 'INSERT INTO kept VALUES (62)');
  const ended = new Promise((heard) => first.onExit(heard));
  process.kill(first.pid, 'SIGKILL');
  expect(await ended).toBe('signal SIGKILL');
  const second = await startMariadb({ dataDir, isThrowAway: true });
  expect(await query(second.url('steepfall'), 'SELECT id FROM kept')).toEqual([[62]]);
  await second.stop();
});

test('a data directory that is in use is not touched', async () => {
  const mariadb = await startMariadb({ dataDir, isThrowAway: true });
  await expect(startMariadb({ dataDir, isThrowAway: true })).rejects.toThrow(/is in use by process \d+; stop that one/);
  expect(await query(mariadb.url('steepfall'), 'SELECT 1')).toEqual([[1]]);
  await mariadb.stop();
  await mariadb.stop();
});

test('lost credentials are made anew', async () => {
  const first = await startMariadb({ dataDir, isThrowAway: true });
  await first.stop();
  rmSync(`${dataDir}.credentials.json`);
  const second = await startMariadb({ dataDir, isThrowAway: true });
  expect(second.password).not.toBe(first.password);
  expect(await query(second.url('steepfall'), 'SELECT 1')).toEqual([[1]]);
  await second.stop();
});

test('a start that was cut short while the database was made begins again', async () => {
  mkdirSync(`${dataDir}.unfinished/mysql`, { recursive: true });
  mkdirSync(dataDir);
  const mariadb = await startMariadb({ dataDir, isThrowAway: true });
  expect(await query(mariadb.url('steepfall'), 'SELECT 1')).toEqual([[1]]);
  await mariadb.stop();
});
