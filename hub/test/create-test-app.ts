import 'reflect-metadata';
import type { NestExpressApplication } from '@nestjs/platform-express';
import type { AddressInfo } from 'node:net';
import { readEnvironment } from '../src/config/environment.js';
import { createApp } from '../src/create-app.js';
import { migrateDatabase } from '../src/database/migrate.js';
import { createThrowAwayDatabase } from './database.js';

export interface TestApp {
  app: NestExpressApplication;
  /** `http://127.0.0.1:<port>`; for supertest: `request(testApp.url).get('/api/health')`. */
  url: string;
  databaseUrl: string;
  /** Stops the hub and starts another one on the same database, in this same object. */
  restart: () => Promise<void>;
  /** Stops the hub and drops its database. */
  close: () => Promise<void>;
}

export const testEnvironment = {
  NODE_ENV: 'test',
  JWT_SECRET: 'a secret of the specs, known to everybody',
  HOST: '127.0.0.1',
  PORT: '0',
  LOG_LEVEL: 'fatal',
};

/** The real hub on a free port, on a database of its own that was migrated as in production. */
export async function createTestApp(variables: Record<string, string> = {}): Promise<TestApp> {
  const database = await createThrowAwayDatabase();
  const config = readEnvironment({ ...testEnvironment, DATABASE_URL: database.url, ...variables });
  const start = async () => {
    const app = await createApp(config);
    await app.listen(config.port, config.host);
    const { port } = app.getHttpServer().address() as AddressInfo;
    return { app, url: `http://127.0.0.1:${port}` };
  };
  try {
    await migrateDatabase(database.url);
    const testApp: TestApp = {
      ...(await start()),
      databaseUrl: database.url,
      async restart() {
        await testApp.app.close();
        Object.assign(testApp, await start());
      },
      async close() {
        await testApp.app.close();
        await database.drop();
      },
    };
    return testApp;
  } catch (error) {
    await database.drop();
    throw error;
  }
}
