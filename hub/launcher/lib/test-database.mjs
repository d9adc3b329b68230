import { randomBytes } from 'node:crypto';
import { mkdirSync, mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { startMariadb } from './mariadb.mjs';
import { testDataDir } from './paths.mjs';
import { findByArgument } from './processes.mjs';

/** No test run takes that long; what is older was left by one that was killed. */
const leftoverAgeMs = 2 * 60 * 60 * 1000;

/**
 * Starts a MariaDB for one test run; `stop` ends it and removes its files.
 * @returns {Promise<{ url: string, stop: () => Promise<void> }>} the URL names no database; its user may make ones
 *   whose name begins with `steepfall_test_`
 */
export async function startTestDatabase() {
  mkdirSync(testDataDir, { recursive: true });
  removeLeftovers();
  const folder = mkdtempSync(join(testDataDir, 'mariadb-'));
  try {
    const mariadb = await startMariadb({ dataDir: join(folder, 'data'), isThrowAway: true });
    return {
      url: mariadb.url(''),
      async stop() {
        await mariadb.stop();
        rmSync(folder, { recursive: true, force: true });
      },
    };
  } catch (error) {
    rmSync(folder, { recursive: true, force: true });
    throw error;
  }
}

function removeLeftovers() {
  for (const name of readdirSync(testDataDir)) {
    const folder = join(testDataDir, name);
    const isInUse = ['data', 'mariadb'].some((data) => findByArgument(`--datadir=${join(folder, data)}`).length > 0);
    const facts = statSync(folder, { throwIfNoEntry: false });
    if (facts && !isInUse && Date.now() - facts.mtimeMs > leftoverAgeMs)
      rmSync(folder, { recursive: true, force: true });
  }
}

/**
 * An empty database that nobody else uses, on the server of this test run (STEEPFALL_TEST_MARIADB_URL).
 * @returns {Promise<{ url: string, drop: () => Promise<void> }>}
 */
export async function createTestDatabase() {
  const server = process.env['STEEPFALL_TEST_MARIADB_URL'];
  if (!server) throw new Error('STEEPFALL_TEST_MARIADB_URL is not set; the global set-up of the project sets it.');
  const name = `steepfall_test_${randomBytes(6).toString('hex')}`;
  await onServer(server, `CREATE DATABASE ${name} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  const url = new URL(server);
  url.pathname = `/${name}`;
  return { url: url.href, drop: () => onServer(server, `DROP DATABASE ${name}`) };
}

/**
 * @param {string} url
 * @param {string} statement
 */
async function onServer(url, statement) {
  // Only specs come here, and they run after npm install; the launcher before it.
  const { createConnection } = await import('mariadb');
  const { hostname, port, username, password } = new URL(url);
  const connection = await createConnection({ host: hostname, port: Number(port), user: username, password });
  try {
    await connection.query(statement);
  } finally {
    await connection.end();
  }
}
