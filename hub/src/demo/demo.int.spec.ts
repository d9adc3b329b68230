import type { Batch, BatchPlan, Ingredient, LotMove, RunEvents } from '@steepfall/shared/contracts';
import { foldRun } from '@steepfall/shared/runs';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildBatch, signInAs } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { demoSignIns } from './demo-house.js';
import { localDate } from './demo-rows.js';
import { ensureDemo, resetDemo } from './demo.js';

const DAY_MS = 24 * 3_600_000;
const signIn = (url: string, email: string, password: string) =>
  request(url).post('/api/auth/sign-in').send({ email, password });

describe('the demo house', () => {
  let testApp: TestApp;
  beforeAll(async () => {
    testApp = await createTestApp({ DEMO: 'on' });
  });
  afterAll(() => testApp.close());

  const counts = async () => {
    const rows: Record<string, number> = {};
    for (const table of [
      'houses',
      'users',
      'memberships',
      'batches',
      'runs',
      'run_events',
      'readings',
      'recipe_revisions',
    ]) {
      const [row] = await testApp.app
        .get(Sequelize)
        .query<{ count: number }>(`SELECT COUNT(*) AS count FROM ${table}`, { type: QueryTypes.SELECT });
      rows[table] = row?.count ?? 0;
    }
    return rows;
  };
  let bearer = '';
  const asBrewer = (method: 'get' | 'post' | 'delete', path: string) =>
    request(testApp.url)[method](`/api${path}`).set('authorization', bearer);
  const signInAsBrewer = async () => {
    const { email, password } = demoSignIns[1]!;
    const { accessToken } = (await signIn(testApp.url, email, password)).body as { accessToken: string };
    bearer = `Bearer ${accessToken}`;
  };
  const batches = async () => {
    await signInAsBrewer();
    return (await asBrewer('get', '/batches')).body as Batch[];
  };

  /** Receives a lot, uses some of it by mistake, and sets some aside. */
  const workInTheStores = async () => {
    await signInAsBrewer();
    const facts = { kind: 'other', name: 'lemon peel', lowStockG: null, allergens: '' };
    const { id } = (await asBrewer('post', '/stores/ingredients').send({ facts }).expect(201)).body as Ingredient;
    const lotFacts = { code: 'P-1', receivedOn: '2026-05-01', bestBefore: null, pricePerKg: 9, note: '', hops: null };
    const received = await asBrewer('post', `/stores/ingredients/${id}/lots`)
      .send({ facts: lotFacts, massG: 200 })
      .expect(201);
    const lotId = (received.body as Ingredient).lots[0]!.id;
    const used = { kind: 'used', massG: 20, reason: 'tea', mayGoBelowZero: false };
    await asBrewer('post', `/stores/lots/${lotId}/moves`).send(used).expect(201);
    const [move] = (await asBrewer('get', `/stores/lots/${lotId}/moves`)).body as LotMove[];
    await asBrewer('delete', `/stores/moves/${move!.id}`).expect(200);
    const { revisionId, kettleId, chillerId, kegId, plannedOn } = (await batches())[0]!;
    const reserve = [{ additionId: 'sencha', lotId, massG: 50 }];
    await asBrewer('post', '/batches')
      .send({ revisionId, kettleId, chillerId, kegId, plannedOn, probeId: null, reserve })
      .expect(201);
  };

  it('is made once, whoever asks again', async () => {
    const nowMs = Date.now() - 3 * DAY_MS;
    expect(await ensureDemo(testApp.databaseUrl, nowMs)).toBe('made');
    const first = await counts();
    expect(first).toMatchObject({ houses: 1, users: 5, memberships: 5, batches: 2, runs: 1, recipe_revisions: 5 });
    expect(first['readings']).toBeGreaterThan(3000);
    expect(await ensureDemo(testApp.databaseUrl, nowMs)).toBe('kept');
    expect(await counts()).toEqual(first);
  });

  it('has a batch for today, also days later', async () => {
    const nowMs = Date.now();
    await ensureDemo(testApp.databaseUrl, nowMs);
    expect((await batches()).find(({ status }) => status === 'planned')).toMatchObject({ plannedOn: localDate(nowMs) });
    const before = (await counts())['batches'];
    await ensureDemo(testApp.databaseUrl, nowMs);
    expect((await counts())['batches']).toBe(before);
  });

  it('has set aside from its stores what that batch needs', async () => {
    const { id } = (await batches()).find(({ status }) => status === 'planned')!;
    const { sheet, weighOut } = (await asBrewer('get', `/batches/${id}/plan`)).body as BatchPlan;
    expect(sheet.steps.map((step) => step.id)).toContain('hops-in');
    expect(weighOut.map(({ name, massG, lots }) => [name, massG, lots.map((lot) => [lot.massG, lot.state])])).toEqual([
      ['calcium chloride', 2, [[2, 'reserved']]],
      ['gypsum', 1, [[1, 'reserved']]],
      ['citric acid', 4.5, [[4.5, 'reserved']]],
      ['sencha', 90, [[90, 'reserved']]],
      ['Cascade', 60, [[60, 'reserved']]],
    ]);
  });

  it('plans another one when that was called off', async () => {
    const nowMs = Date.now();
    const { id } = (await batches()).find(({ status }) => status === 'planned')!;
    await asBrewer('delete', `/batches/${id}`).expect(204);
    await ensureDemo(testApp.databaseUrl, nowMs);
    const next = (await batches()).filter(({ status }) => status === 'planned');
    expect(next).toMatchObject([{ plannedOn: localDate(nowMs) }]);
    expect(next[0]?.id).not.toBe(id);
  });

  it('has a finished batch in the book, with its log and its curve', async () => {
    const listed = await batches();
    const finished = listed.find(({ status }) => status === 'finished');
    expect(finished?.run).toMatchObject({ outcome: 'finished', currentStepTitle: null, alertStage: null });
    const { id, lastSeq } = finished!.run!;
    const { events } = (await asBrewer('get', `/runs/${id}/events?afterSeq=0`)).body as RunEvents;
    expect(events).toHaveLength(lastSeq);
    expect(foldRun(events)).toMatchObject({ status: 'ended', conflicts: [] });
    const { readings } = (await asBrewer('get', `/runs/${id}/readings`)).body as {
      readings: { tempC: number | null }[];
    };
    expect(Math.max(...readings.map(({ tempC }) => tempC ?? 0))).toBeGreaterThan(76);
  });

  it('lets everybody on its list in', async () => {
    for (const { email, password, role } of demoSignIns)
      expect((await signIn(testApp.url, email, password)).body).toMatchObject({ member: { role } });
  });

  it('is made anew, and takes nothing of another house with it', async () => {
    const { author } = await buildBatch(testApp);
    const stranger = await signInAs(testApp, 'brewer', { house: author.house });
    await workInTheStores();
    await resetDemo(testApp.databaseUrl, Date.now());
    const before = await counts();
    await resetDemo(testApp.databaseUrl, Date.now());
    expect(await counts()).toEqual(before);
    const kept = await request(testApp.url).get('/api/batches').set('authorization', stranger.bearer);
    expect(kept.body).toHaveLength(1);
  });
});

describe('where the demo is switched off', () => {
  let testApp: TestApp;
  beforeAll(async () => {
    testApp = await createTestApp({ DEMO: 'off' });
    await ensureDemo(testApp.databaseUrl, Date.now());
  });
  afterAll(() => testApp.close());

  it('its well-known passwords open no door', async () => {
    for (const { email, password } of demoSignIns)
      expectProblem(await signIn(testApp.url, email, password), 'wrong-credentials');
  });
});
