import { execFileSync, spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdirSync, mkdtempSync, rmSync, statSync } from 'node:fs';
import { createServer, type AddressInfo } from 'node:net';
import { join, resolve } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, picture, signedIn } from './browser.ts';
import { Hand } from './hand.ts';

const root = resolve(import.meta.dirname, '../..');
/** Chromium finds no name by multicast here; the names of this machine lead to it all the same. */
const resolveNames = '--host-resolver-rules=MAP *.local 127.0.0.1';

let folder: string;
let launcher: ChildProcess;
let printed = '';
let origin: string;
let guide: string;
let trusting: Browser;
let strange: Browser;
let page: Page;

beforeAll(async () => {
  folder = mkdtempSync(join(root, '.test-data', 'lan-'));
  const [port, guidePort] = [await freePort(), await freePort()];
  launcher = spawn(
    process.execPath,
    [join(root, 'hub/launcher/start.mjs'), '--lan', '--port', `${port}`, '--guide-port', `${guidePort}`],
    {
      // What is built already is not looked at again.
      env: { ...process.env, STEEPFALL_DATA_DIR: join(folder, 'data'), STEEPFALL_HUB_DIR: join(root, 'hub/dist') },
      stdio: ['ignore', 'pipe', 'pipe'],
    },
  );
  for (const stream of [launcher.stdout, launcher.stderr])
    stream?.on('data', (chunk: Buffer) => (printed += chunk.toString()));
  await ready();
  // The address in the network; on a machine without one, its name.
  [, origin = ''] = /ready: (https:\S+)/.exec(printed) ?? [];
  [, guide = ''] = /how to trust the hub: (http:\S+)/.exec(printed) ?? [];
  if (guide === '') guide = `http://localhost:${guidePort}`;
  const home = join(folder, 'home');
  trust(home, join(folder, 'data/tls/authority.crt'));
  trusting = await openBrowser([resolveNames], home);
  strange = await openBrowser([resolveNames], join(folder, 'other-home'));
});

afterAll(async () => {
  await trusting?.close();
  await strange?.close();
  if (launcher && launcher.exitCode === null) {
    launcher.kill('SIGTERM');
    await once(launcher, 'exit');
  }
  if (folder) rmSync(folder, { recursive: true, force: true });
});

describe('HTTPS on the network of the house', () => {
  it('prints where to go, and the fingerprint; the key is for its owner only', () => {
    expect(printed).toMatch(/SHA-256 {2}[0-9A-F ]{40,}/);
    expect(statSync(join(folder, 'data/tls/authority.pem')).mode & 0o777).toBe(0o600);
  });

  it('is refused by a browser that does not trust it, and the page about trusting says so', async () => {
    const stranger = await strange.newPage();
    await expect(stranger.goto(origin)).rejects.toThrow('ERR_CERT_AUTHORITY_INVALID');
    const context = await strange.newContext();
    const reader = await context.newPage();
    await reader.goto(guide);
    await reader.getByRole('heading', { name: 'Not trusted yet.' }).waitFor();
    expect(await picture(reader, 'trust')).toEqual([]);
    const file = reader.waitForEvent('download');
    await reader.getByRole('link', { name: 'Get the certificate' }).first().click();
    expect((await file).suggestedFilename()).toBe('steepfall.pem');
  });

  it('is a secure place for one that does: worker, wake lock, socket, cookie', async () => {
    const reader = await trusting.newPage();
    await reader.goto(guide);
    await reader.getByRole('heading', { name: 'This device trusts the hub.' }).waitFor();
    await reader.getByRole('link', { name: 'Open Steepfall' }).waitFor();
    // The address, the name in the network, and the machine itself.
    for (const [place] of printed.matchAll(/https:\S+/g)) expect((await reader.goto(place))?.status(), place).toBe(200);
    const signed = await signedIn(trusting, origin, 'brewer');
    page = signed.page;
    expect(await page.evaluate(() => isSecureContext)).toBe(true);
    await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
    await page.reload();
    expect(await page.evaluate(() => navigator.serviceWorker.controller?.state)).toBe('activated');
    expect(await page.evaluate(() => navigator.wakeLock.request('screen').then(({ type }) => type))).toBe('screen');
    const [cookie] = await signed.context.cookies(`${origin}/api/auth`);
    expect(cookie).toMatchObject({ secure: true, httpOnly: true, sameSite: 'Strict' });
    const answer = await page.request.get(origin, { ignoreHTTPSErrors: true });
    // On an address or a name of the kitchen it would shut out everything else there.
    expect(answer.headers()['strict-transport-security']).toBeUndefined();
  });

  it('opens the run sheet with the hub gone, after one visit', async () => {
    const socket = page.waitForEvent('websocket', { predicate: (line) => line.url().startsWith('wss://') });
    await page.getByRole('button', { name: 'Rehearse' }).click();
    const hand = new Hand(page);
    await hand.until('Sound check');
    await socket;
    await hand.checkSound();
    await hand.until('Check the kit');
    launcher.kill('SIGTERM');
    await once(launcher, 'exit');
    await page.goto(page.url());
    await new Hand(page).until('Check the kit');
  });
});

async function ready(): Promise<void> {
  while (!printed.includes('Ctrl-C stops it.')) {
    if (launcher.exitCode !== null) throw new Error(`It ended before it was ready: ${printed}`);
    await new Promise((later) => setTimeout(later, 50));
  }
}

/** As a person does it on the page about certificates of Chromium's settings. */
function trust(home: string, certificate: string): void {
  const database = join(home, '.pki/nssdb');
  mkdirSync(database, { recursive: true });
  execFileSync('/usr/bin/certutil', ['-d', `sql:${database}`, '-N', '--empty-password']);
  execFileSync('/usr/bin/certutil', ['-d', `sql:${database}`, '-A', '-t', 'C,,', '-n', 'steepfall', '-i', certificate]);
}

async function freePort(): Promise<number> {
  const listener = createServer().listen(0);
  await once(listener, 'listening');
  const { port } = listener.address() as AddressInfo;
  listener.close();
  await once(listener, 'close');
  return port;
}
