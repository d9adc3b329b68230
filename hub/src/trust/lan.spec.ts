import 'reflect-metadata';
import { once } from 'node:events';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer } from 'node:https';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { connect } from 'node:tls';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { Lan } from './lan.js';

let folder: string;
beforeEach(() => (folder = mkdtempSync(join(tmpdir(), 'steepfall-lan-'))));
afterEach(() => rmSync(folder, { recursive: true }));

it('hands out a renewed certificate without a new start, and goes on with the old one when the folder is gone', async () => {
  const lan = await Lan.open({ folder: join(folder, 'tls'), guidePort: 0 });
  const server = createServer({ ...lan.tls }).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  const facts = await lan.attend(server, '127.0.0.1', null);
  expect(facts).toMatchObject({ isNewAuthority: true, outside: [] });
  const ca = readFileSync(join(folder, 'tls/authority.crt'));
  const serial = async () => {
    const line = connect({ host: '127.0.0.1', port, ca, servername: 'localhost' });
    await once(line, 'secureConnect');
    const { serialNumber } = line.getPeerCertificate();
    line.destroy();
    return serialNumber;
  };
  const first = await serial();
  await lan.look();
  expect(await serial()).toBe(first);
  rmSync(join(folder, 'tls/hub.pem'));
  await lan.look();
  const second = await serial();
  expect(second).not.toBe(first);
  rmSync(join(folder, 'tls'), { recursive: true });
  await lan.look();
  expect(await serial()).toBe(second);
  expect(existsSync(join(folder, 'tls'))).toBe(false);
  server.close();
  await once(server, 'close');
});
