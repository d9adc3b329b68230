import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { buildProbe, modelOf, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { closeSockets, connectDevice, disconnected, handshake, openSocket } from '../../test/sockets.js';
import { Probe } from './models/probe.model.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterEach(() => closeSockets());
afterAll(() => testApp.close());

const call = (method: 'get' | 'post' | 'delete', path = '', who: SignedInMember = brewer) =>
  request(testApp.url)[method](`/api/probes${path}`).set('authorization', who.bearer);
const values = { name: 'Kettle probe', lagS: 7.5, resolutionC: 0.0625, samplePeriodS: 1 };
const push = (deviceToken: string) =>
  request(testApp.url)
    .post('/api/device/readings')
    .set('authorization', `Bearer ${deviceToken}`)
    .send({ readings: [{ atMs: Date.now(), tempC: 20 }] });

describe('/api/probes', () => {
  it('needs a sign-in, and a role that may', async () => {
    expectProblem(await request(testApp.url).get('/api/probes'), 'not-signed-in');
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expect((await call('get', '', hand)).status).toBe(200);
    expectProblem(await call('post', '', hand).send(values), 'not-allowed');
    expectProblem(await call('get', '', await signInAs(testApp, 'taster')), 'not-allowed');
  });

  it('refuses what no probe is like', async () => {
    const response = await call('post').send({
      name: ' ',
      lagS: -1,
      resolutionC: 0,
      samplePeriodS: 0.01,
      colour: 'red',
    });
    expectProblem(response, 'not-valid');
    const { errors } = response.body as { errors: { pointer: string }[] };
    expect(errors.map(({ pointer }) => pointer)).toEqual(
      expect.arrayContaining(['/name', '/lagS', '/resolutionC', '/samplePeriodS']),
    );
  });

  it('adds one, tells its token once and keeps a hash only', async () => {
    const created = await call('post').send(values);
    expect(created.status).toBe(201);
    const { probe, deviceToken } = created.body as { probe: { id: string }; deviceToken: string };
    expect(probe).toEqual({ id: probe.id, ...values, isSimulated: false, isRevoked: false, lastReadingAtMs: null });
    expect(deviceToken).toMatch(new RegExp(`^${probe.id.replaceAll('-', '')}\\.[\\w-]{43}$`));
    const row = await modelOf(testApp, Probe).findByPk(probe.id);
    expect(JSON.stringify(row)).not.toContain(deviceToken.split('.')[1]);
    expect(row?.tokenHash).toMatch(/^[0-9a-f]{64}$/);

    const atMs = Date.now();
    expect((await push(deviceToken)).body).toEqual({ accepted: 1, duplicates: 0, refused: [] });
    const listed = (await call('get')).body as { id: string; lastReadingAtMs: number }[];
    expect(listed.find(({ id }) => id === probe.id)?.lastReadingAtMs).toBeGreaterThanOrEqual(atMs);
    expect(JSON.stringify(listed)).not.toContain('oken');
  });

  it('gives a new token in place of the old one, and cuts the line that came in with it', async () => {
    const { probe, deviceToken } = await buildProbe(testApp, brewer.house);
    const line = await connectDevice(testApp, deviceToken);
    const rotated = await call('post', `/${probe.id}/token`);
    expect(rotated.status).toBe(201);
    const fresh = (rotated.body as { deviceToken: string }).deviceToken;
    await disconnected(line);
    expectProblem(await push(deviceToken), 'device-token-unknown');
    expect((await push(fresh)).status).toBe(200);
    const again = openSocket(testApp, { deviceToken });
    expect(await handshake(again)).toMatchObject({ type: '/problems/device-token-unknown' });
    expect(await handshake(openSocket(testApp, { deviceToken: fresh }))).toBeNull();
  });

  it('shuts a probe out at once on both doors, and lets it in again with a new token', async () => {
    const { probe, deviceToken } = await buildProbe(testApp, brewer.house);
    const line = await connectDevice(testApp, deviceToken);
    await call('delete', `/${probe.id}/token`).expect(204);
    await disconnected(line);
    expectProblem(await push(deviceToken), 'device-token-unknown');
    expect(await handshake(openSocket(testApp, { deviceToken }))).toMatchObject({
      type: '/problems/device-token-unknown',
    });
    expect((await call('get')).body).toContainEqual(expect.objectContaining({ id: probe.id, isRevoked: true }));
    await call('delete', `/${probe.id}/token`).expect(204);

    const { body } = await call('post', `/${probe.id}/token`);
    expect(body).toMatchObject({ probe: { isRevoked: false } });
    expect((await push((body as { deviceToken: string }).deviceToken)).status).toBe(200);
  });

  it('hides what belongs to another house', async () => {
    const { probe } = await buildProbe(testApp, brewer.house);
    const stranger = await signInAs(testApp, 'owner');
    expect((await call('get', '', stranger)).body).toEqual([]);
    expectProblem(await call('post', `/${probe.id}/token`, stranger), 'not-found');
    expectProblem(await call('delete', `/${probe.id}/token`, stranger), 'not-found');
  });
});
