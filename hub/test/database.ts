import { randomBytes } from 'node:crypto';
import { createConnection } from 'mariadb';

/** The URL of the MariaDB of this test run, with the name of a database put in. */
function serverUrl(database: string): string {
  const base = process.env['STEEPFALL_TEST_MARIADB_URL'];
  if (!base) throw new Error('STEEPFALL_TEST_MARIADB_URL is not set; test/global-setup.ts does that.');
  const url = new URL(base);
  url.pathname = `/${database}`;
  return url.href;
}

async function onServer(statement: string): Promise<void> {
  const url = new URL(serverUrl(''));
  const connection = await createConnection({
    host: url.hostname,
    port: Number(url.port || 3306),
    user: decodeURIComponent(url.username),
    password: decodeURIComponent(url.password),
  });
  try {
    await connection.query(statement);
  } finally {
    await connection.end();
  }
}

export interface ThrowAwayDatabase {
  url: string;
  drop: () => Promise<void>;
}

/** An empty database that nobody else uses. */
export async function createThrowAwayDatabase(): Promise<ThrowAwayDatabase> {
  const name = `steepfall_test_${randomBytes(6).toString('hex')}`;
  await onServer(`CREATE DATABASE ${name}`);
  return { url: serverUrl(name), drop: () => onServer(`DROP DATABASE ${name}`) };
}
