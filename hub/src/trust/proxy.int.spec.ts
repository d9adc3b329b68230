import { PROTOCOL_VERSION } from '@steepfall/shared/contracts';
import { request as plainRequest } from 'node:http';
import { request as secureRequest } from 'node:https';
import { io } from 'socket.io-client';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildHouse, buildMember, buildProbe, buildRun, signInAs, TEST_PASSWORD } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { proxies, startProxy, type RunningProxy } from '../../test/proxy.js';

interface Asked {
  body?: unknown;
  headers?: Record<string, string>;
  ca?: string;
  /** The address that it comes from; all of 127.0.0.0/8 is this machine. */
  localAddress?: string;
}

interface Answered {
  status: number | undefined;
  headers: Record<string, string | string[] | undefined>;
}

function ask(url: string, { body, headers = {}, ca, localAddress }: Asked = {}): Promise<Answered> {
  return new Promise((resolve, reject) => {
    const call = (url.startsWith('https') ? secureRequest : plainRequest)(
      url,
      {
        ca,
        servername: 'localhost',
        localAddress,
        family: 4,
        agent: false,
        method: body === undefined ? 'GET' : 'POST',
        headers: { ...headers, ...(body === undefined ? {} : { 'content-type': 'application/json' }) },
      },
      (answer) => {
        answer.resume();
        answer.once('end', () => resolve({ status: answer.statusCode, headers: answer.headers }));
      },
    );
    call.once('error', reject);
    call.end(body === undefined ? undefined : JSON.stringify(body));
  });
}

const guess = { email: 'nobody@wrenfold.example', password: 'not the password' };
/** Tries as many as are free, and one more. */
async function useUp(url: string, asked: (nth: number) => Asked): Promise<(number | undefined)[]> {
  const statuses: (number | undefined)[] = [];
  for (let nth = 1; nth <= 21; nth += 1)
    statuses.push((await ask(`${url}/api/auth/sign-in`, { body: guess, ...asked(nth) })).status);
  return statuses;
}
const cookieOf = ({ headers }: Answered) => String(headers['set-cookie']);

describe('a hub that trusts no proxy', () => {
  let testApp: TestApp;
  beforeAll(async () => (testApp = await createTestApp()));
  afterAll(() => testApp.close());

  it('counts tries by where they come from, whatever they say', async () => {
    const statuses = await useUp(testApp.url, (nth) => ({ headers: { 'x-forwarded-for': `203.0.113.${nth}` } }));
    expect(statuses).toEqual([...Array<number>(20).fill(401), 429]);
  });

  it('believes nobody that the line is safe', async () => {
    const { email } = await buildMember(testApp);
    const answer = await ask(`${testApp.url}/api/auth/sign-in`, {
      body: { email, password: TEST_PASSWORD },
      headers: { 'x-forwarded-proto': 'https', 'x-forwarded-host': 'hub.brewhouse.org', host: 'hub.brewhouse.org' },
    });
    expect(answer.status).toBe(200);
    expect(cookieOf(answer)).not.toContain('Secure');
    expect(answer.headers['strict-transport-security']).toBeUndefined();
  });
});

const behind = (proxy: (typeof proxies)[number]) => () => {
  let testApp: TestApp;
  let front: RunningProxy;
  beforeAll(async () => {
    testApp = await createTestApp({ TRUST_PROXY: 'on', PUBLIC_ORIGIN: 'https://hub.brewhouse.org' });
    front = await startProxy(proxy, testApp.url);
  });
  afterAll(async () => {
    await front?.stop();
    await testApp?.close();
  });

  it('signs in, with a cookie for HTTPS only', async () => {
    const { email } = await buildMember(testApp);
    const body = { email, password: TEST_PASSWORD };
    const answer = await ask(`${front.url}/api/auth/sign-in`, { body, ca: front.ca });
    expect(answer.status).toBe(200);
    expect(cookieOf(answer)).toMatch(/Path=\/api\/auth;.*HttpOnly; Secure; SameSite=Strict/);
  });

  it('asks for HTTPS for ever under a public name, and under no other', async () => {
    const asked = (host: string) => ask(`${front.url}/api/health`, { ca: front.ca, headers: { host } });
    expect((await asked('hub.brewhouse.org')).headers['strict-transport-security']).toBe('max-age=31536000');
    for (const host of ['localhost', '192.168.1.20', 'kettle-room.local'])
      expect((await asked(host)).headers['strict-transport-security'], host).toBeUndefined();
  });

  it('carries the socket', async () => {
    const { accessToken } = await signInAs(testApp, 'brewer');
    const socket = io(front.url, {
      ca: front.ca,
      transports: ['websocket'],
      reconnection: false,
      auth: { accessToken, protocol: PROTOCOL_VERSION },
    });
    await new Promise<void>((resolve, reject) => {
      socket.once('connect', resolve);
      socket.once('connect_error', reject);
    });
    expect(socket.io.engine.transport.name).toBe('websocket');
    socket.disconnect();
  });

  it('lets a device in by its door', async () => {
    const { bearer } = await buildProbe(testApp, await buildHouse(testApp));
    const headers = { authorization: bearer };
    expect((await ask(`${front.url}/api/device/clock`, { ca: front.ca, headers })).status).toBe(200);
    const readings = [{ atMs: Date.now(), tempC: 71.5 }];
    const sent = await ask(`${front.url}/api/device/readings`, { ca: front.ca, headers, body: { readings } });
    expect(sent.status).toBe(200);
  });

  it('counts tries by the address that the proxy saw, and by nothing that was made up before it', async () => {
    const statuses = await useUp(front.url, (nth) => ({
      ca: front.ca,
      headers: { 'x-forwarded-for': `203.0.113.${nth}` },
    }));
    expect(statuses).toEqual([...Array<number>(20).fill(401), 429]);
    const other = await ask(`${front.url}/api/auth/sign-in`, { body: guess, ca: front.ca, localAddress: '127.0.0.2' });
    expect(other.status).toBe(401);
  });

  it('makes links for phones that lead to the public address', async () => {
    const author = await signInAs(testApp, 'brewer');
    const { run } = await buildRun(testApp, { author });
    const answer = await fetch(`${testApp.url}/api/runs/${run.id}/follow-links`, {
      headers: { authorization: `Bearer ${author.accessToken}` },
    });
    expect(await answer.json()).toMatchObject({ origins: ['https://hub.brewhouse.org'] });
  });
};

it('is tried behind a real proxy', () => {
  expect(proxies.map(({ name }) => name)).toContain('Apache');
});

for (const proxy of proxies) describe(`a hub behind ${proxy.name}`, behind(proxy));
