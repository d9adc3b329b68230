import type { RunReadings, RunSummary } from '@steepfall/shared/contracts';
import { currentStep, type RunEventOf, type StoredRunEvent } from '@steepfall/shared/runs';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { buildProbe, buildRecipe, buildRun, modelOf, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { addQuickKit, Practice, startRehearsal } from '../../test/practice.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { closeSockets, until } from '../../test/sockets.js';
import { Clock } from '../common/clock.js';
import { newId } from '../common/ids.js';
import { Run } from '../runs/models/run.model.js';
import { RehearsalsService } from './rehearsals.service.js';

let testApp: TestApp;
let hand: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  hand = await signInAs(testApp, 'hand');
  await addQuickKit(testApp, await signInAs(testApp, 'brewer', { house: hand.house }));
});
afterEach(() => closeSockets());
afterAll(() => testApp.close());

const post = (body: object, who = hand) =>
  request(testApp.url).post('/api/rehearsals').set('authorization', who.bearer).send(body);
const get = async <Body>(path: string) =>
  (await request(testApp.url).get(`/api${path}`).set('authorization', hand.bearer).expect(200)).body as Body;
const stagesOf = (events: readonly StoredRunEvent[], key: string) =>
  events
    .filter((event): event is StoredRunEvent & RunEventOf<'alert.raised'> => event.type === 'alert.raised')
    .filter(({ payload }) => payload.key === key)
    .map(({ payload }) => payload.stage);

describe('POST /api/rehearsals', () => {
  it('needs a sign-in, and a role that may', async () => {
    expectProblem(await request(testApp.url).post('/api/rehearsals').send({ rate: 10 }), 'not-signed-in');
    for (const role of ['taster', 'pourer'] as const)
      expectProblem(await post({ rate: 10 }, await signInAs(testApp, role, { house: hand.house })), 'not-allowed');
  });

  it('refuses what cannot be practised', async () => {
    expectProblem(await post({}), 'not-valid', ['/rate']);
    expectProblem(await post({ rate: 61, seed: 0 }), 'not-valid', ['/rate', '/seed']);
    expectProblem(await post({ rate: 10, revisionId: newId() }), 'not-valid', ['/revisionId']);
    const stranger = await signInAs(testApp, 'brewer');
    const { revisions } = await buildRecipe(testApp, { author: stranger });
    expectProblem(await post({ rate: 10, revisionId: revisions[0]!.id }), 'not-valid', ['/revisionId']);
    expectProblem(await post({ rate: 10 }, await signInAs(testApp, 'hand')), 'not-found');
  });

  it('begins a run that is marked, on a fast clock, with the first recipe of the house', async () => {
    const { recipe } = await buildRecipe(testApp, { author: hand, name: 'First recipe' });
    const response = await post({ rate: 30, seed: 7 });
    expect(response.status).toBe(201);
    const run = response.body as RunSummary;
    expect(run).toMatchObject({
      title: `Rehearsal: ${recipe.name}`,
      isRehearsal: true,
      batchId: null,
      status: 'running',
      clock: { rate: 30, anchorRunMs: run.startedAtMs },
      probeId: expect.any(String),
      probeLagS: 7.5,
      coolantC: 12,
    });
    await until(async () => (await get<RunReadings>(`/runs/${run.id}/readings`)).totalCount > 20);
    const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
    expect(readings.map(({ atMs }) => atMs - run.startedAtMs)).toEqual(readings.map((_, index) => index * 1000));
    const { events } = await get<{ events: { payload: object }[] }>(`/runs/${run.id}/events`);
    expect(events[0]?.payload).toMatchObject({ document: { v: 2 }, kit: { altitudeM: expect.any(Number) } });
    // Its probe is nobody's to manage.
    expect(await get('/probes')).toEqual([]);
  });

  it('gives the same readings for the same seed', async () => {
    const runs = await Promise.all([1, 2].map(() => startRehearsal(testApp, hand, { seed: 11, rate: 60 })));
    const readings = () => Promise.all(runs.map(({ id }) => get<RunReadings>(`/runs/${id}/readings`)));
    await until(async () => (await readings()).every(({ totalCount }) => totalCount > 60));
    const [a, b] = (await readings()).map((answer) => answer.readings.slice(0, 60).map(({ tempC }) => tempC));
    expect(a).toEqual(b);
  });
});

describe('a rehearsal at sixty times', () => {
  it('goes from the first step to the last: the alert for the hops comes in time and once, and nothing is lost', async () => {
    const run = await startRehearsal(testApp, hand, { seed: 3 });
    const practice = new Practice(hand, run);
    await practice.join(testApp);
    await practice.follow((state) => state.steps.every(({ status }) => status === 'done'), 60_000);
    await practice.act({ type: 'endRun', outcome: 'finished' });

    const rows = await testApp.app
      .get(Sequelize)
      .query<{ seq: number; id: string; type: string }>(
        'SELECT seq, id, type FROM run_events WHERE run_id = ? ORDER BY seq',
        {
          type: QueryTypes.SELECT,
          replacements: [run.id],
        },
      );
    expect(rows).toEqual(practice.events.map(({ seq, id, type }) => ({ seq, id, type })));

    const stages = stagesOf(practice.events, 'hops-in');
    expect(stages).toEqual([...new Set(stages)]);
    expect(stages).toContain('now');
    const now = practice.events.find(
      (event) => event.type === 'alert.raised' && event.payload.key === 'hops-in' && event.payload.stage === 'now',
    )!;
    expect(now).toMatchObject({ by: null, station: 'hub', payload: { targetC: 62, direction: 'falling' } });
    const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
    const crossed = readings.find(({ atMs, tempC }) => atMs > now.atMs && tempC! <= 62)!;
    expect(crossed.atMs).toBeGreaterThan(now.atMs);
    expect(crossed.atMs - now.atMs).toBeLessThan(60_000);
    expect(stagesOf(practice.events, 'signal')).toEqual([]);
    expect(practice.state.conflicts).toEqual([]);

    const ended = await get<RunSummary>(`/runs/${run.id}`);
    expect(ended).toMatchObject({ status: 'ended', outcome: 'finished', currentStepTitle: null });
    // The probe came out with the transfer: nothing is read after that.
    const transfer = practice.events.find(
      (event) => event.type === 'step.done' && event.payload.stepId === 'transfer',
    )!;
    expect(readings.at(-1)!.atMs).toBeLessThan(transfer.atMs + 60_000);
  }, 90_000);

  it('takes back what is taken back: the heat goes off again', async () => {
    const run = await startRehearsal(testApp, hand, { seed: 5 });
    const practice = new Practice(hand, run);
    await practice.join(testApp);
    await practice.follow((state) => state.doneOrder.includes('light-heat'));
    const lastC = async () => (await get<RunReadings>(`/runs/${run.id}/readings`)).readings.at(-1)?.tempC ?? 0;
    const coldC = await lastC();
    await until(async () => (await lastC()) > coldC + 5);
    await practice.act({ type: 'goBack' });
    expect(currentStep(practice.state)?.step.id).toBe('light-heat');
    await until(async () => {
      const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
      const last = readings.slice(-30).map(({ tempC }) => tempC!);
      return last.length === 30 && last.at(-1)! < last[0]! + 0.3;
    });
  });

  it('changes its pace without a jump', async () => {
    const run = await startRehearsal(testApp, hand, { rate: 10 });
    const practice = new Practice(hand, run);
    await practice.join(testApp);
    await practice.act({ type: 'changeRate', rate: 60, wallMs: Date.now() });
    expect((await get<RunSummary>(`/runs/${run.id}`)).clock.rate).toBe(60);
    await until(async () => (await get<RunReadings>(`/runs/${run.id}/readings`)).totalCount > 90);
    const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
    expect(readings.map(({ atMs }) => atMs - run.startedAtMs)).toEqual(readings.map((_, index) => index * 1000));
  });
});

describe('a restart of the hub in the middle of a rehearsal', () => {
  it('loses nothing: the log, the readings, the kettle, the run clock and the alerts go on', async () => {
    const run = await startRehearsal(testApp, hand, { seed: 8 });
    const practice = new Practice(hand, run);
    await practice.join(testApp);
    await practice.follow((state) => state.doneOrder.includes('tea-out'), 40_000);
    // At sixty times the hops would be missed while the hub is away.
    await practice.act({ type: 'changeRate', rate: 1, wallMs: Date.now() });
    await practice.follow((state) => state.doneOrder.includes('chill'));
    expect(stagesOf(practice.events, 'hops-in')).not.toContain('now');
    const before = practice.events;
    const readBefore = (await get<RunReadings>(`/runs/${run.id}/readings`)).readings;
    closeSockets();
    await testApp.restart();

    await practice.join(testApp);
    expect(practice.events.slice(0, before.length)).toEqual(before);
    await practice.act({ type: 'changeRate', rate: 60, wallMs: Date.now() });
    await practice.follow((state) => state.doneOrder.includes('hops-out'), 30_000);
    const { readings } = await get<RunReadings>(`/runs/${run.id}/readings`);
    expect(readings.slice(0, readBefore.length)).toEqual(readBefore);
    // The liquid goes on from where it was, and the time that the hub was away is told as well.
    for (const [index, { atMs, tempC }] of readings.entries()) {
      const earlier = readings[index - 1];
      if (!earlier) continue;
      expect(atMs - earlier.atMs).toBe(1000);
      expect(Math.abs(tempC! - earlier.tempC!)).toBeLessThan(1.5);
    }
    const stages = stagesOf(practice.events, 'hops-in');
    expect(stages).toEqual([...new Set(stages)]);
    expect(stages).toContain('now');
    expect(practice.events.map(({ seq }) => seq)).toEqual(practice.events.map((_, index) => index + 1));
  }, 90_000);
});

describe('a rehearsal that listens to a real probe', () => {
  const clockOf = async (bearer: string) =>
    (await request(testApp.url).get('/api/device/clock').set('authorization', bearer).expect(200))
      .body as RunSummary['clock'];

  it('gives it its clock, judges by it, and keeps its readings apart from those of real time', async () => {
    const { probe, bearer } = await buildProbe(testApp, hand.house);
    const run = await startRehearsal(testApp, hand, { probeId: probe.id, rate: 60 });
    expect(run.probeId).not.toBe(probe.id);
    expect(await clockOf(bearer)).toEqual(run.clock);
    expectProblem(await post({ rate: 60, probeId: probe.id }), 'not-valid', ['/probeId']);
    const push = (readings: object[]) =>
      request(testApp.url).post('/api/device/readings').set('authorization', bearer).send({ readings }).expect(200);
    const practice = new Practice(hand, run);
    await practice.join(testApp);
    await until(() => practice.nowMs > Date.now() + 61_000);
    const readings = [{ atMs: practice.nowMs, tempC: 70 }];
    const answer = await push([...readings, { atMs: practice.nowMs + 200_000, tempC: 70 }]);
    expect(answer.body).toEqual({ accepted: 1, duplicates: 0, refused: [{ index: 1, reason: 'in-the-future' }] });
    expect(await get(`/runs/${run.id}/readings`)).toMatchObject({ readings });

    await practice.act({ type: 'endRun', outcome: 'abandoned' });
    expect((await clockOf(bearer)).rate).toBe(1);
    const wall = [{ atMs: Date.now(), tempC: 20 }];
    expect((await push(wall)).body).toMatchObject({ accepted: 1 });
    expect(await get(`/runs/${run.id}/readings`)).toMatchObject({ readings });
  });

  it('does not take one that is shut out, simulated, of another house, or in another kettle', async () => {
    const { probe } = await buildProbe(testApp, hand.house);
    await probe.update({ revokedAtMs: 1 });
    const simulated = await startRehearsal(testApp, hand);
    const { probe: foreign } = await buildProbe(testApp, (await signInAs(testApp, 'brewer')).house);
    const brewer = await signInAs(testApp, 'brewer', { house: hand.house });
    const { probe: busy } = await buildRun(testApp, { author: brewer });
    for (const probeId of [probe.id, simulated.probeId!, foreign.id, busy.id, newId()])
      expectProblem(await post({ rate: 10, probeId }), 'not-valid', ['/probeId']);
  });
});

describe('a rehearsal that nobody touches', () => {
  it('is ended after two hours by the hub; a real run is not', async () => {
    const run = await startRehearsal(testApp, hand);
    const brewer = await signInAs(testApp, 'brewer', { house: hand.house });
    const { run: real } = await buildRun(testApp, { author: brewer });
    const rehearsals = testApp.app.get(RehearsalsService, { strict: false });
    await rehearsals.endIdle();
    expect(await get(`/runs/${run.id}`)).toMatchObject({ status: 'running' });
    const inThreeHoursMs = Date.now() + 3 * 3_600_000;
    const clock = vi.spyOn(testApp.app.get(Clock, { strict: false }), 'nowMs').mockReturnValue(inThreeHoursMs);
    await rehearsals.endIdle().finally(() => clock.mockRestore());
    expect(await get(`/runs/${run.id}`)).toMatchObject({ status: 'ended', outcome: 'abandoned' });
    expect(await get(`/runs/${real.id}`)).toMatchObject({ status: 'running' });
    const row = await modelOf(testApp, Run).findByPk(run.id);
    expect(row?.kettleSetup).toMatchObject({ waterMassKg: 8 });
  });
});
