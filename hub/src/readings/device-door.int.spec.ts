import type { PushedReadings } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildHouse, buildProbe } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { askRaw, closeSockets, connectDevice, handshake, openSocket, type HubSocket } from '../../test/sockets.js';
import type { House } from '../houses/models/house.model.js';

let testApp: TestApp;
let house: House;
beforeAll(async () => {
  testApp = await createTestApp();
  house = await buildHouse(testApp);
});
afterAll(async () => {
  closeSockets();
  await testApp.close();
});

type Answer = PushedReadings | { problem: Problem };
type Push = (body: unknown) => Promise<Answer>;

const post = (bearer: string, body: unknown) =>
  request(testApp.url)
    .post('/api/device/readings')
    .set('authorization', bearer)
    .send(body as object);

/** Each door with a probe of its own. */
const doors: [string, () => Promise<{ probeId: string; push: Push }>][] = [
  [
    'HTTP',
    async () => {
      const { probe, bearer } = await buildProbe(testApp, house);
      const push: Push = async (body) => {
        const response = await post(bearer, body);
        return response.status === 200 ? (response.body as PushedReadings) : { problem: response.body as Problem };
      };
      return { probeId: probe.id, push };
    },
  ],
  [
    'socket',
    async () => {
      const { probe, deviceToken } = await buildProbe(testApp, house);
      const socket: HubSocket = await connectDevice(testApp, deviceToken);
      return { probeId: probe.id, push: (body) => askRaw(socket, 'readings.push', body, 20_000) as Promise<Answer> };
    },
  ],
];

async function kept(probeId: string): Promise<{ atMs: number; tempC: number | null }[]> {
  return testApp.app
    .get(Sequelize)
    .query<{ atMs: number; tempC: number | null }>(
      'SELECT at_ms AS atMs, temp_c AS tempC FROM readings WHERE probe_id = ? ORDER BY at_ms',
      { type: QueryTypes.SELECT, replacements: [probeId] },
    );
}

const pointersOf = (answer: Answer) =>
  'problem' in answer ? answer.problem.errors?.map(({ pointer }) => pointer) : undefined;

describe.each(doors)('the device door over %s', (_, open) => {
  it('keeps readings before it says so, out of order too, and gives them back as they came', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const readings = [5, 1, 4, 2, 3].map((second) => ({ atMs: nowMs - second * 1000, tempC: 70.0625 + second / 16 }));
    expect(await push({ readings })).toEqual({ accepted: 5, duplicates: 0, refused: [] });
    expect(await kept(probeId)).toEqual([...readings].sort((a, b) => a.atMs - b.atMs));
  });

  it('keeps what the driver of a probe says when something is wrong', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const readings = [null, -127, 85].map((tempC, index) => ({ atMs: nowMs - 3000 + index * 1000, tempC }));
    expect(await push({ readings })).toMatchObject({ accepted: 3, refused: [] });
    expect(await kept(probeId)).toEqual(readings);
  });

  it('counts duplicates and changes nothing by them', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const readings = [1, 2, 3].map((second) => ({ atMs: nowMs - second * 1000, tempC: 60 }));
    expect(await push({ readings })).toEqual({ accepted: 3, duplicates: 0, refused: [] });
    const again = [...readings, { atMs: nowMs, tempC: 61 }, { atMs: nowMs, tempC: 62 }].map((reading) => ({
      ...reading,
      tempC: reading.tempC + 5,
    }));
    expect(await push({ readings: again })).toEqual({ accepted: 1, duplicates: 4, refused: [] });
    expect((await kept(probeId)).map(({ tempC }) => tempC)).toEqual([60, 60, 60, 66]);
  });

  it('refuses readings from the future, from long ago, and beyond any temperature, and keeps the others', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const readings = [
      { atMs: nowMs + 120_000, tempC: 70 },
      { atMs: nowMs - 31 * 24 * 3_600_000, tempC: 70 },
      { atMs: nowMs - 1000, tempC: 1e300 },
      { atMs: nowMs, tempC: 70 },
    ];
    expect(await push({ readings })).toEqual({
      accepted: 1,
      duplicates: 0,
      refused: [
        { index: 0, reason: 'in-the-future' },
        { index: 1, reason: 'too-old' },
        { index: 2, reason: 'out-of-range' },
      ],
    });
    expect(await kept(probeId)).toEqual([{ atMs: nowMs, tempC: 70 }]);
    const bad = readings.slice(0, 1);
    expect(await push({ readings: bad })).toMatchObject({ accepted: 0, refused: [{ index: 0 }] });
  });

  it('takes ten thousand in one call, twice, and not one more', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const readings = Array.from({ length: 10_001 }, (_ignored, index) => ({ atMs: nowMs - index * 250, tempC: 70.5 }));
    const tooMany = await push({ readings });
    expect(tooMany).toMatchObject({ problem: { type: '/problems/not-valid', status: 422 } });
    expect(pointersOf(tooMany)).toEqual(['/readings']);
    expect(await kept(probeId)).toEqual([]);
    readings.pop();
    expect(await push({ readings })).toEqual({ accepted: 10_000, duplicates: 0, refused: [] });
    expect(await push({ readings })).toEqual({ accepted: 0, duplicates: 10_000, refused: [] });
    expect(await kept(probeId)).toHaveLength(10_000);
  });

  it.each([
    ['text for a number', { readings: [{ atMs: 1, tempC: '70' }] }, ['/readings/0/tempC']],
    ['no time', { readings: [{ tempC: 70 }] }, ['/readings/0/atMs']],
    ['half a millisecond', { readings: [{ atMs: 1.5, tempC: 70 }] }, ['/readings/0/atMs']],
    ['fields that nobody knows', { readings: [{ atMs: 1, tempC: 70, unit: 'F' }] }, ['/readings/0']],
    ['an empty list', { readings: [] }, ['/readings']],
    ['no list', { readings: 'many' }, ['/readings']],
    ['nothing', {}, ['/readings']],
    ['two mistakes', { readings: [{ atMs: -1, tempC: [] }] }, ['/readings/0/atMs', '/readings/0/tempC']],
  ])('refuses %s as a whole, and says where', async (_case, body, pointers) => {
    const { probeId, push } = await open();
    const answer = await push(body);
    expect(answer).toMatchObject({ problem: { type: '/problems/not-valid', status: 422 } });
    expect(pointersOf(answer)).toEqual(pointers);
    expect(await kept(probeId)).toEqual([]);
  });

  it('answers every one of many calls at once, and keeps every reading once', async () => {
    const { probeId, push } = await open();
    const nowMs = Date.now();
    const calls = Array.from({ length: 40 }, (_ignored, call) =>
      push({ readings: [0, 1].map((index) => ({ atMs: nowMs - (call + index) * 1000, tempC: 50 })) }),
    );
    const answers = (await Promise.all(calls)) as PushedReadings[];
    expect(answers.reduce((sum, { accepted }) => sum + accepted, 0)).toBe(41);
    expect(answers.reduce((sum, { duplicates }) => sum + duplicates, 0)).toBe(39);
    expect(await kept(probeId)).toHaveLength(41);
  });
});

describe('a stranger at the device door', () => {
  it('is refused over HTTP whatever is sent', async () => {
    const body = { readings: [{ atMs: Date.now(), tempC: 20 }] };
    expectProblem(await request(testApp.url).post('/api/device/readings').send(body), 'device-token-unknown');
    for (const bearer of ['Bearer wrong', 'Basic abc', 'Bearer ', `Bearer ${'x'.repeat(5000)}`])
      expectProblem(await post(bearer, body), 'device-token-unknown');
  });

  it('is refused over the socket before anything can be sent', async () => {
    for (const auth of [{ deviceToken: 'wrong' }, { deviceToken: '' }, { deviceToken: 7 }, {}]) {
      const problem = await handshake(openSocket(testApp, auth));
      expect(problem?.status).toBe(401);
    }
  });

  it('cannot be told from a probe of another kind of token: a body that is no JSON is not readable', async () => {
    const { bearer } = await buildProbe(testApp, house);
    const response = await request(testApp.url)
      .post('/api/device/readings')
      .set('authorization', bearer)
      .set('content-type', 'application/json')
      .send('{"readings":');
    expectProblem(response, 'not-readable');
  });
});

describe('GET /api/device/clock', () => {
  it('is wall time for a probe that is in no run', async () => {
    const { bearer } = await buildProbe(testApp, house);
    const beforeMs = Date.now();
    const { body } = await request(testApp.url).get('/api/device/clock').set('authorization', bearer).expect(200);
    const clock = body as { anchorWallMs: number; anchorRunMs: number; rate: number };
    expect(clock).toEqual({ anchorWallMs: clock.anchorRunMs, anchorRunMs: clock.anchorRunMs, rate: 1 });
    expect(clock.anchorWallMs).toBeGreaterThanOrEqual(beforeMs);
  });
});
