import 'reflect-metadata';
import { X509Certificate } from '@peculiar/x509';
import { X509Certificate as NodeCertificate } from 'node:crypto';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { get as plainGet } from 'node:http';
import { createServer, get } from 'node:https';
import type { AddressInfo } from 'node:net';
import { tmpdir, type NetworkInterfaceInfo } from 'node:os';
import { join } from 'node:path';
import tls from 'node:tls';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makeAuthority, readScope, scopeOf, within } from './authority.js';
import { issueCertificate, readNames } from './certificate.js';
import { createGuideServer, listenGuide } from './guide-server.js';
import { describeMachine, reachableFrom } from './machine.js';
import { isRealName } from './real-name.js';
import { renewalReason, validityReason } from './renewal.js';
import { keepTrust } from './trust-folder.js';

const DAY_MS = 24 * 60 * 60 * 1000;
const nowMs = Date.now();
const one = (address: string, family: 'IPv4' | 'IPv6', internal = false) =>
  ({ address, family, internal }) as NetworkInterfaceInfo;
const machine = describeMachine('Kettle-Room', {
  lo: [one('127.0.0.1', 'IPv4', true), one('::1', 'IPv6', true)],
  wlan0: [one('192.168.1.20', 'IPv4'), one('fe80::1', 'IPv6'), one('fd00::2', 'IPv6')],
});
const folder = mkdtempSync(join(tmpdir(), 'steepfall-tls-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe(describeMachine, () => {
  it('knows the names and the addresses by which a tablet comes', () => {
    expect(machine).toEqual({
      names: ['kettle-room.local', 'kettle-room', 'localhost'],
      addresses: ['192.168.1.20', '127.0.0.1', '::1'],
    });
    expect(reachableFrom(machine)).toEqual(['192.168.1.20', 'kettle-room.local']);
  });

  it('leaves out what no certificate can name, and is the machine itself without a network', () => {
    const alone = describeMachine('under_score', { eth0: [one('169.254.3.4', 'IPv4')] });
    expect(alone).toEqual({ names: ['localhost'], addresses: ['127.0.0.1', '::1'] });
    expect(reachableFrom(alone)).toEqual([]);
    expect(describeMachine('hub.brewhouse.org', {}).names).toEqual([
      'hub.local',
      'hub',
      'hub.brewhouse.org',
      'localhost',
    ]);
  });
});

describe('the certificates', () => {
  let authority: Awaited<ReturnType<typeof makeAuthority>>;
  let hub: Awaited<ReturnType<typeof issueCertificate>>;
  beforeAll(async () => {
    authority = await makeAuthority(machine, nowMs);
    hub = await issueCertificate(authority, machine, nowMs);
  });

  it('make an authority that signs certificates of the house and nothing else', () => {
    const node = new NodeCertificate(authority.certificate);
    expect(node.ca).toBe(true);
    expect(node.verify(node.publicKey)).toBe(true);
    const read = new X509Certificate(authority.certificate);
    expect(read.subjectName.getField('CN')[0]).toMatch(/^Steepfall on kettle-room, \d{4}-\d\d-\d\d$/);
    expect(describeExtensions(read)).toMatchObject({ '2.5.29.19': true, '2.5.29.15': true, '2.5.29.30': false });
    // keyCertSign and cRLSign; a path length of zero.
    expect(hexOf(read, '2.5.29.15')).toBe('03020106');
    expect(hexOf(read, '2.5.29.19')).toBe('30060101ff020100');
    expect(readScope(read)).toEqual(scopeOf(machine));
    expect((read.notAfter.getTime() - nowMs) / DAY_MS).toBeCloseTo(3652, 0);
  });

  it('make a certificate of at most 397 days, for a server, with every name and address', () => {
    const read = new X509Certificate(hub.certificate);
    expect(readNames(read)).toEqual(machine);
    expect(read.notBefore.getTime()).toBeLessThan(nowMs);
    expect(read.notAfter.getTime() - read.notBefore.getTime()).toBeLessThanOrEqual(397 * DAY_MS);
    expect(new NodeCertificate(hub.certificate).ca).toBe(false);
    expect(hexOf(read, '2.5.29.15')).toBe('03020780');
    // serverAuth
    expect(hexOf(read, '2.5.29.37')).toBe('300a06082b06010505070301');
    expect(hub.key).not.toBe(authority.key);
  });

  it('never outlive the authority', async () => {
    const late = nowMs + 3600 * DAY_MS;
    const { certificate } = await issueCertificate(authority, machine, late);
    expect(new X509Certificate(certificate).notAfter).toEqual(new X509Certificate(authority.certificate).notAfter);
  });

  it.each(['localhost', 'kettle-room.local', '192.168.1.20', '::1'])(
    'are taken by a client that trusts the authority: %s',
    async (host) => expect(await statusBy(hub, host, authority.certificate)).toBe(200),
  );

  it('are refused by one that does not, or under another name', async () => {
    await expect(statusBy(hub, 'localhost')).rejects.toThrow('unable to verify');
    await expect(statusBy(hub, 'kettle-room.org', authority.certificate)).rejects.toThrow('not in the cert');
  });

  it.each([
    { names: ['bank.org'], addresses: [] },
    { names: ['notlocal'], addresses: [] },
    { names: ['localhost'], addresses: ['203.0.113.7'] },
  ])('cannot be made for others, whoever has the key: %j', async (other) => {
    const forged = await issueCertificate(authority, other, nowMs);
    await expect(statusBy(forged, other.names[0] ?? '', authority.certificate)).rejects.toThrow('permitted subtree');
  });
});

describe(within, () => {
  it('parts what an authority may speak for from the rest', () => {
    const moved = { names: ['other.local', 'other', 'localhost'], addresses: ['10.1.2.3', '203.0.113.7', '::1'] };
    expect(within(scopeOf(machine), moved)).toEqual({
      inside: { names: ['other.local', 'localhost'], addresses: ['10.1.2.3', '::1'] },
      outside: ['other', '203.0.113.7'],
    });
    expect(within(scopeOf(moved), moved).outside).toEqual([]);
  });
});

describe('when to renew', () => {
  const validity = { notBeforeMs: 0, notAfterMs: 397 * DAY_MS };
  it('thirty days before the end, after it, and when the clock was set back', () => {
    expect(validityReason(validity, 366 * DAY_MS)).toBeNull();
    expect(validityReason(validity, 367 * DAY_MS + 1)).toBe('ending');
    expect(validityReason(validity, 500 * DAY_MS)).toBe('ending');
    expect(validityReason(validity, -1)).toBe('not-yet-valid');
  });

  it('for a name or an address that is new, and not for one that is gone', () => {
    const certificate = { ...validity, names: ['a.local'], addresses: ['10.0.0.1'] };
    const reason = (names: string[], addresses: string[]) => renewalReason(certificate, { names, addresses }, DAY_MS);
    expect(reason(['a.local'], ['10.0.0.1'])).toBeNull();
    expect(reason(['a.local'], [])).toBeNull();
    expect(reason(['b.local'], ['10.0.0.1'])).toBe('names-changed');
    expect(reason(['a.local'], ['10.0.0.2'])).toBe('names-changed');
  });
});

describe(keepTrust, () => {
  const keep = (path: string, atMs = nowMs, of = machine) => keepTrust(join(folder, path), of, atMs);
  const modeOf = (path: string) => (statSync(join(folder, path)).mode & 0o777).toString(8);

  it('makes both once, for their owner only', async () => {
    const first = await keep('once');
    expect(first).toMatchObject({ isNewAuthority: true, isNewCertificate: true });
    expect(['once', 'once/authority.pem', 'once/hub.pem', 'once/authority.crt'].map(modeOf)).toEqual([
      '700',
      '600',
      '600',
      '644',
    ]);
    expect(readFileSync(join(folder, 'once/authority.crt'), 'utf8')).not.toContain('PRIVATE');
    const second = await keep('once');
    expect(second).toEqual({ trust: first.trust, isNewAuthority: false, isNewCertificate: false });
    expect(JSON.stringify(first.trust)).not.toContain(keyIn('once/authority.pem'));
  });

  it('renews the certificate before its end and on another network, and keeps the authority', async () => {
    const first = await keep('renewed');
    const moved = { ...machine, addresses: ['10.9.8.7'] };
    const later = await keep('renewed', nowMs, moved);
    expect(later).toMatchObject({
      isNewAuthority: false,
      isNewCertificate: true,
      trust: { names: moved, outside: [] },
    });
    const nextYear = await keep('renewed', nowMs + 380 * DAY_MS, moved);
    expect(nextYear).toMatchObject({ isNewAuthority: false, isNewCertificate: true });
    expect(nextYear.trust.authority).toEqual(first.trust.authority);
    expect(await keep('renewed', nowMs + 380 * DAY_MS, moved)).toMatchObject({ isNewCertificate: false });
  });

  it('says which address it cannot name', async () => {
    await keep('outside');
    const moved = { ...machine, addresses: ['203.0.113.7', '127.0.0.1'] };
    const { trust } = await keep('outside', nowMs, moved);
    expect(trust).toMatchObject({ outside: ['203.0.113.7'], names: { addresses: ['127.0.0.1'] } });
  });

  it('makes a new authority when the old one ends or its file is broken, and a certificate that fits it', async () => {
    const first = await keep('anew');
    writeFileSync(join(folder, 'anew/authority.pem'), '-----BEGIN');
    const second = await keep('anew');
    expect(second).toMatchObject({ isNewAuthority: true, isNewCertificate: true });
    expect(second.trust.authority.sha256).not.toBe(first.trust.authority.sha256);
    expect(await keep('anew', nowMs + 3640 * DAY_MS)).toMatchObject({ isNewAuthority: true, isNewCertificate: true });
  });

  /** Its second line; the first is the same for every key of this kind. */
  function keyIn(path: string): string {
    const [, line = 'no key'] = /PRIVATE KEY-----\n.+\n(.+)\n/.exec(readFileSync(join(folder, path), 'utf8')) ?? [];
    return line;
  }
});

describe(isRealName, () => {
  it('is one that a public authority could vouch for', () => {
    for (const name of ['hub.brewhouse.org', 'Kitchen.Example.COM.']) expect(isRealName(name), name).toBe(true);
    for (const name of ['localhost', 'vm', 'vm.local', '192.168.1.2', '[::1]', '::1', 'a.home.arpa', 'x.internal', ''])
      expect(isRealName(name), name).toBe(false);
  });
});

describe('the page about trusting', () => {
  let url: string;
  let server: ReturnType<typeof createGuideServer>;
  let trust: Awaited<ReturnType<typeof keepTrust>>['trust'];
  beforeAll(async () => {
    ({ trust } = await keepTrust(join(folder, 'guide'), machine, nowMs));
    server = createGuideServer({ trust: () => trust, httpsPort: () => 4643, tabletDist: null });
    url = `http://127.0.0.1:${await listenGuide(server, 0, '127.0.0.1')}`;
  });
  afterAll(() => {
    server.close();
    server.closeAllConnections();
  });

  it('hands out the certificate as each system wants it, and its fingerprint', async () => {
    const der = await fetch(`${url}/steepfall.crt`);
    expect(der.headers.get('content-type')).toBe('application/x-x509-ca-cert');
    const given = new NodeCertificate(Buffer.from(await der.arrayBuffer()));
    expect(given.fingerprint256).toBe(trust.authority.sha256);
    const pem = await fetch(`${url}/steepfall.pem`).then((answer) => answer.text());
    expect(new NodeCertificate(pem).fingerprint256).toBe(given.fingerprint256);
    const page = await fetch(url).then((answer) => answer.text());
    expect(page).toContain(given.fingerprint256.split(':').slice(0, 4).join(' '));
    expect(page).toContain('https://127.0.0.1:4643/trust-check');
    for (const device of ['iPad', 'Android', 'Windows', 'Mac', 'Linux']) expect(page).toContain(`<summary>${device}`);
  });

  it('gives no key away, and has nothing else', async () => {
    const paths = ['/', '/steepfall.crt', '/steepfall.pem'];
    for (const path of paths) expect(await fetch(url + path).then((answer) => answer.text())).not.toContain('PRIVATE');
    for (const path of [
      '/authority.pem',
      '/hub.pem',
      '/tls/authority.pem',
      '/../authority.pem',
      '/%2e%2e/authority.pem',
      '/api/health',
      '/api/auth/sign-in',
      '/socket.io/?EIO=4&transport=polling',
      '/index.html',
    ])
      expect((await fetch(url + path)).status, path).toBe(404);
    expect((await fetch(url, { method: 'POST', body: 'x' })).status).toBe(405);
  });

  it('says nothing that a request made up', async () => {
    const page = await new Promise<string>((resolve, reject) => {
      plainGet(url, { headers: { host: '"><script>alert(1)</script>' } }, (answer) => {
        let text = '';
        answer.on('data', (chunk: Buffer) => (text += chunk.toString()));
        answer.on('end', () => resolve(text));
      }).on('error', reject);
    });
    expect(page).not.toContain('alert(1)');
    expect(page).toContain('https://192.168.1.20:4643');
  });
});

function hexOf(certificate: X509Certificate, type: string): string {
  return Buffer.from(certificate.getExtension(type)?.value ?? new ArrayBuffer()).toString('hex');
}

/** Type and whether it is critical. */
function describeExtensions(certificate: X509Certificate): Record<string, boolean> {
  return Object.fromEntries(certificate.extensions.map(({ type, critical }) => [type, critical]));
}

/** Asks a server with this certificate as Node does, under any name. */
async function statusBy(
  { certificate, key }: { certificate: string; key: string },
  host: string,
  ca?: string,
): Promise<number | undefined> {
  const server = createServer({ cert: certificate, key }, (_, response) => response.end()).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  try {
    return await new Promise<number | undefined>((resolve, reject) => {
      const checkServerIdentity: typeof tls.checkServerIdentity = (_, peer) => tls.checkServerIdentity(host, peer);
      get({ host: '127.0.0.1', port, ca, agent: false, servername: '', checkServerIdentity }, (answer) => {
        answer.resume();
        resolve(answer.statusCode);
      }).on('error', reject);
    });
  } finally {
    server.close();
    server.closeAllConnections();
  }
}
