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

const call = (method: 'get' | 'post' | 'patch' | 'delete', path = '', who: SignedInMember = brewer) =>
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
    expect(probe).toEqual({
      id: probe.id,
      ...values,
      isSimulated: false,
      isRevoked: false,
      lastReadingAtMs: null,
      calibration: null,
      calibratedAtMs: null,
      lagErrorRatio: null,
      version: 1,
    });
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

const calibration = { low: { shownC: 0.4, trueC: 0 }, high: { shownC: 97.9, trueC: 98.31 } };

describe('PATCH /api/probes/:id', () => {
  it('changes it at a version, and refuses the old version', async () => {
    const { probe } = await buildProbe(testApp, brewer.house);
    const change = { ...values, name: 'Long finger', lagS: 12.5, calibration, version: 1 };
    const beforeMs = Date.now();
    const changed = await call('patch', `/${probe.id}`).send(change);
    expect(changed.body).toMatchObject({ id: probe.id, ...change, version: 2 });
    const { calibratedAtMs } = changed.body as { calibratedAtMs: number };
    expect(calibratedAtMs).toBeGreaterThanOrEqual(beforeMs);
    expectProblem(await call('patch', `/${probe.id}`).send(change), 'changed-meanwhile');
    // A new name is no new calibration.
    const renamed = await call('patch', `/${probe.id}`).send({ ...change, name: 'Finger', version: 2 });
    expect(renamed.body).toMatchObject({ name: 'Finger', calibration, calibratedAtMs, version: 3 });
    const cleared = await call('patch', `/${probe.id}`).send({ ...change, calibration: null, version: 3 });
    expect(cleared.body).toMatchObject({ calibration: null, calibratedAtMs: null });
  });

  it.each([
    ['swapped points', { low: calibration.high, high: calibration.low }, '/calibration/high/shownC', /swapped/],
    ['a bad slope', { ...calibration, high: { shownC: 93, trueC: 98.31 } }, '/calibration/high/shownC', /3 %/],
    [
      'a bad ice bath',
      { low: { shownC: 3, trueC: 0 }, high: { shownC: 101.2, trueC: 98.31 } },
      '/calibration/low/shownC',
      /ice bath/,
    ],
    ['letters', { ...calibration, low: { shownC: 'cold', trueC: 0 } }, '/calibration/low/shownC', /./],
    ['1e9', { ...calibration, high: { shownC: 1e9, trueC: 98.31 } }, '/calibration/high/shownC', /./],
    ['NaN', { ...calibration, low: { shownC: Number.NaN, trueC: 0 } }, '/calibration/low/shownC', /./],
  ])('refuses %s, says where, and keeps what it had', async (_case, bad, pointer, words) => {
    const { probe } = await buildProbe(testApp, brewer.house);
    const response = await call('patch', `/${probe.id}`).send({ ...values, calibration: bad, version: 1 });
    expectProblem(response, 'not-valid', [pointer]);
    expect((response.body as { errors: { detail: string }[] }).errors[0]?.detail).toMatch(words);
    expect(await modelOf(testApp, Probe).findByPk(probe.id)).toMatchObject({ calibration: null, version: 1 });
  });

  it('is for those who look after the kit, of this house', async () => {
    const { probe } = await buildProbe(testApp, brewer.house);
    const body = { ...values, calibration: null, version: 1 };
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expectProblem(await call('patch', `/${probe.id}`, hand).send(body), 'not-allowed');
    expectProblem(await call('patch', `/${probe.id}`, await signInAs(testApp, 'owner')).send(body), 'not-found');
  });
});
