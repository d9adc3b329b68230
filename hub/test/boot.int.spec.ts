import type { ChildProcessWithoutNullStreams } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { killHubs, startBuiltHub } from './built-hub.js';
import { createThrowAwayDatabase, type ThrowAwayDatabase } from './database.js';

// Under Node's own module loader, circular imports of models fail that pass in Vitest: so the built hub is started as it is shipped.
let database: ThrowAwayDatabase;
let tabletDist: string;

beforeAll(async () => {
  database = await createThrowAwayDatabase();
  tabletDist = mkdtempSync(join(tmpdir(), 'tablet-'));
  mkdirSync(join(tabletDist, 'assets'));
  writeFileSync(join(tabletDist, 'index.html'), '<!doctype html><title>Steepfall</title>');
  writeFileSync(join(tabletDist, 'sw.js'), '// worker');
  writeFileSync(join(tabletDist, 'assets', 'index-a1b2c3.js'), '// code');
});
afterAll(async () => {
  rmSync(tabletDist, { recursive: true });
  await database.drop();
});
afterEach(() => killHubs());

const start = (variables: Record<string, string> = {}) =>
  startBuiltHub({ DATABASE_URL: database.url, TABLET_DIST: tabletDist, ...variables });

async function exitOf(child: ChildProcessWithoutNullStreams): Promise<number | string> {
  const [code, signal] = child.exitCode === null ? await once(child, 'exit') : [child.exitCode, child.signalCode];
  return (code ?? signal) as number | string;
}

describe('the built hub', () => {
  it('boots on an empty database, serves, and goes when it is told', async () => {
    const { child, line } = await start();
    expect(line.event).toBe('hub.listening');
    const url = `http://127.0.0.1:${line.port}`;
    const health = await request(url).get('/api/health');
    expect(health.body).toMatchObject({ status: 'ok', database: 'up' });
    child.kill('SIGTERM');
    expect(await exitOf(child)).toBe('SIGTERM');
    const again = await start();
    expect(again.line.event).toBe('hub.listening');
  });

  it('serves the tablet: hashed files for ever, everything else anew each time, and its page for every screen', async () => {
    const { line } = await start();
    const get = (path: string) => request(`http://127.0.0.1:${line.port}`).get(path);
    expect((await get('/assets/index-a1b2c3.js')).headers['cache-control']).toContain('immutable');
    for (const path of ['/', '/sw.js', '/runs/1', '/index.html'])
      expect((await get(path)).headers['cache-control'], path).toBe('no-cache');
    expect((await get('/runs/1')).text).toContain('<title>Steepfall</title>');
    for (const path of ['/assets/gone-1.js', '/picture.png', '/socket.iox.js'])
      expect((await get(path)).status, path).toBe(404);
    const api = await get('/api/nothing-here');
    expect(api.status).toBe(404);
    expect(api.body).toMatchObject({ type: '/problems/not-found' });
    expect((await get('/..%2f..%2fpackage.json')).status).toBe(404);
    expect((await get('/')).headers['content-security-policy']).toContain("script-src 'self';");
  });

  it('says that the port is taken, and leaves nothing behind', async () => {
    const squatter = createServer().listen(0, '127.0.0.1');
    await once(squatter, 'listening');
    const { port } = squatter.address() as AddressInfo;
    const { child, line } = await start({ PORT: String(port) });
    expect(line).toMatchObject({ event: 'hub.failed', reason: 'port-taken' });
    expect(await exitOf(child)).toBe(1);
    squatter.close();
  });

  it('says what is wrong with its environment, or that there is no database', async () => {
    const wrong = await start({ JWT_SECRET: 'short', PORT: 'x' });
    expect(wrong.line).toMatchObject({ event: 'hub.failed', reason: 'environment' });
    expect(wrong.line.detail).toMatch(/PORT.*JWT_SECRET/);
    expect(await exitOf(wrong.child)).toBe(1);
    const alone = await start({ DATABASE_URL: 'mariadb://u:p@127.0.0.1:1/none' });
    expect(alone.line).toMatchObject({ event: 'hub.failed', reason: 'database' });
    expect(await exitOf(alone.child)).toBe(1);
  });
});
