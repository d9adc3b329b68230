import 'reflect-metadata';
import type { Server as HttpsServer } from 'node:https';
import { readProcessEnvironment } from './config/environment.js';
import { createApp } from './create-app.js';
import { migrateDatabase } from './database/migrate.js';
import { ensureDemo } from './demo/demo.js';
import { Lan } from './trust/lan.js';

/** One line a machine can read: what starts the hub waits for `hub.listening`, or tells the reason of `hub.failed`. */
function say(event: string, facts: Record<string, unknown>): void {
  process.stdout.write(`${JSON.stringify({ event, ...facts })}\n`);
}

function reasonOf(error: unknown): { reason: string; detail: string } {
  const { code, name, message } = error as { code?: string; name?: string; message?: string };
  const detail = message ?? String(error);
  if (name === 'EnvironmentError') return { reason: 'environment', detail };
  if (code === 'EADDRINUSE') return { reason: 'port-taken', detail };
  if (code === 'EACCES') return { reason: 'port-not-allowed', detail };
  if (name?.startsWith('Sequelize')) return { reason: 'database', detail };
  return { reason: 'unexpected', detail };
}

async function start(): Promise<void> {
  const config = readProcessEnvironment();
  const ran = await migrateDatabase(config.databaseUrl);
  if (ran.length > 0) say('hub.migrated', { migrations: ran });
  if (config.isDemo && (await ensureDemo(config.databaseUrl, Date.now())) === 'made') say('demo.made', {});
  const lan = config.lan && (await Lan.open(config.lan));
  const app = await createApp(config, lan?.tls);
  try {
    await app.listen(config.port, config.host);
    const server = app.getHttpServer() as HttpsServer;
    const facts = lan ? { lan: await lan.attend(server, config.host, config.tabletDist) } : {};
    say('hub.listening', { port: (server.address() as { port: number }).port, ...facts });
  } catch (error) {
    await app.close();
    throw error;
  }
}

try {
  await start();
} catch (error) {
  say('hub.failed', reasonOf(error));
  process.exitCode = 1;
}
