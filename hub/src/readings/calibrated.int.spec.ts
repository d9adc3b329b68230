import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildProbe, buildRun, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { ProbesService } from '../probes/probes.service.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterAll(() => testApp.close());

/** Ice at 0.5 shown and boil at 99.5: one degree shown is 1.0101 true. */
const calibration = { low: { shownC: 0.5, trueC: 0 }, high: { shownC: 99.5, trueC: 100 } };
const trueOf = (shownC: number) => ((shownC - 0.5) * 100) / 99;

const calibrate = (id: string, version: number, points: typeof calibration | null) =>
  request(testApp.url)
    .patch(`/api/probes/${id}`)
    .set('authorization', brewer.bearer)
    .send({ name: 'P', lagS: 7.5, resolutionC: 0.0625, samplePeriodS: 1, calibration: points, version })
    .expect(200);
const push = async (deviceToken: string, readings: { atMs: number; tempC: number | null }[]) =>
  (
    await request(testApp.url)
      .post('/api/device/readings')
      .set('authorization', `Bearer ${deviceToken}`)
      .send({ readings })
  ).body as unknown;
const read = (id: string, query: string, who: SignedInMember = brewer) =>
  request(testApp.url).get(`/api/probes/${id}/readings${query}`).set('authorization', who.bearer);

describe('readings of a calibrated probe', () => {
  it('are corrected from the moment it is calibrated, what it sent is kept, and a duplicate stays one', async () => {
    const { probe, deviceToken } = await buildProbe(testApp, brewer.house);
    const nowMs = Date.now();
    const before = { atMs: nowMs - 3000, tempC: 60 };
    const after = [
      { atMs: nowMs - 2000, tempC: 60 },
      { atMs: nowMs - 1000, tempC: -127 },
    ];
    await push(deviceToken, [before]);
    await calibrate(probe.id, 1, calibration);
    expect(await push(deviceToken, [before, ...after])).toEqual({ accepted: 2, duplicates: 1, refused: [] });
    expect(await push(deviceToken, after)).toEqual({ accepted: 0, duplicates: 2, refused: [] });
    const answer = await read(probe.id, `?fromMs=${nowMs - 10_000}`);
    expect(answer.body).toEqual({
      probeId: probe.id,
      nowMs: expect.any(Number),
      readings: [
        { ...before, shownC: 60 },
        { atMs: nowMs - 2000, tempC: expect.closeTo(trueOf(60), 6), shownC: 60 },
        { atMs: nowMs - 1000, tempC: -127, shownC: -127 },
      ],
    });
    await calibrate(probe.id, 2, null);
    await push(deviceToken, [{ atMs: nowMs, tempC: 60 }]);
    expect((await read(probe.id, `?fromMs=${nowMs}`)).body).toMatchObject({ readings: [{ tempC: 60, shownC: 60 }] });
  });

  it('reach the run corrected', async () => {
    const { run, probe, deviceToken } = await buildRun(testApp, { author: brewer });
    await calibrate(probe.id, 1, calibration);
    const atMs = Date.now();
    await push(deviceToken, [{ atMs, tempC: 70 }]);
    const answer = await request(testApp.url).get(`/api/runs/${run.id}/readings`).set('authorization', brewer.bearer);
    expect(answer.body).toMatchObject({ readings: [{ atMs, tempC: expect.closeTo(trueOf(70), 6) }] });
  });

  it('are corrected after a restart too', async () => {
    const { probe } = await buildProbe(testApp, brewer.house);
    await calibrate(probe.id, 1, calibration);
    await testApp.restart();
    expect(testApp.app.get(ProbesService).correctionOf(probe.id)?.slope).toBeCloseTo(100 / 99, 9);
  });
});

describe('GET /api/probes/:id/readings', () => {
  it('gives the newest 2,000', async () => {
    const { probe, deviceToken } = await buildProbe(testApp, brewer.house);
    const nowMs = Date.now();
    await push(
      deviceToken,
      Array.from({ length: 2100 }, (_, index) => ({ atMs: nowMs - index * 100, tempC: 20 })),
    );
    const { readings } = (await read(probe.id, '?fromMs=0')).body as { readings: { atMs: number }[] };
    expect(readings).toHaveLength(2000);
    expect(readings.at(-1)?.atMs).toBe(nowMs);
    expect(readings[0]?.atMs).toBe(nowMs - 199_900);
  });

  it('needs a role that may and a moment that is one, and hides what belongs to another house', async () => {
    const { probe } = await buildProbe(testApp, brewer.house);
    expectProblem(await request(testApp.url).get(`/api/probes/${probe.id}/readings?fromMs=0`), 'not-signed-in');
    for (const query of ['', '?fromMs=soon', '?fromMs=-1', '?fromMs=NaN', '?fromMs=0&to=1'])
      expectProblem(await read(probe.id, query), 'not-valid');
    const taster = await signInAs(testApp, 'taster', { house: brewer.house });
    expectProblem(await read(probe.id, '?fromMs=0', taster), 'not-allowed');
    expectProblem(await read(probe.id, '?fromMs=0', await signInAs(testApp, 'owner')), 'not-found');
  });
});
