import { existsSync } from 'node:fs';

const launcher = new URL('../launcher/lib/test-database.mjs', import.meta.url);

interface TestDatabase {
  url: string;
  stop: () => Promise<void>;
}

/** A MariaDB for the integration specs: the one that is told, or one that is started for this run and thrown away after it. */
export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env['STEEPFALL_TEST_MARIADB_URL']) return undefined;
  if (!existsSync(launcher))
    throw new Error('Set STEEPFALL_TEST_MARIADB_URL to a MariaDB that the specs may make databases on.');
  const { startTestDatabase } = (await import(launcher.href)) as { startTestDatabase: () => Promise<TestDatabase> };
  const database = await startTestDatabase();
  process.env['STEEPFALL_TEST_MARIADB_URL'] = database.url;
  return () => database.stop();
}
