import type { AppendedEvents, Batch as BatchAnswer, RunEvents, RunSummary } from '@steepfall/shared/contracts';
import { foldRun, type RunEvent } from '@steepfall/shared/runs';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  buildBatch,
  buildEvent,
  buildRun,
  modelOf,
  signInAs,
  usualDocument,
  type SignedInMember,
} from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { newId } from '../common/ids.js';
import { RunEventRow } from './models/run-event.model.js';
import { Run } from './models/run.model.js';

let testApp: TestApp;
let brewer: SignedInMember;
let hand: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
  hand = await signInAs(testApp, 'hand', { house: brewer.house });
});
afterAll(() => testApp.close());

const call = (method: 'get' | 'post', path: string, who: SignedInMember = brewer) =>
  request(testApp.url)[method](`/api${path}`).set('authorization', who.bearer);
const append = async (run: RunSummary, events: object[], who = brewer) =>
  (await call('post', `/runs/${run.id}/events`, who).send({ events }).expect(200)).body as AppendedEvents;
const eventsOf = async (run: RunSummary, afterSeq = 0) =>
  ((await call('get', `/runs/${run.id}/events?afterSeq=${afterSeq}`).expect(200)).body as RunEvents).events;
const done = (run: RunSummary, stepId: string, by: SignedInMember = brewer, overrides = {}) =>
  buildEvent(run, by, 'step.done', { stepId, cause: 'hand', tempC: null }, overrides);
const note = (run: RunSummary, text: string, overrides = {}) =>
  buildEvent(run, brewer, 'note.added', { stepId: null, text }, overrides);

describe('POST /api/batches/:id/runs', () => {
  it('needs a sign-in, a batch of this house, and a role that acts', async () => {
    const { batch } = await buildBatch(testApp, { author: brewer });
    const path = `/batches/${batch.id}/runs`;
    expectProblem(await request(testApp.url).post(`/api${path}`), 'not-signed-in');
    expectProblem(await call('post', path, await signInAs(testApp, 'taster', { house: brewer.house })), 'not-allowed');
    expectProblem(await call('post', path, await signInAs(testApp, 'brewer')), 'not-found');
  });

  it('begins a run with the sheet copied into its first event', async () => {
    const { batch } = await buildBatch(testApp, { author: brewer });
    const response = await call('post', `/batches/${batch.id}/runs`, hand);
    expect(response.status).toBe(201);
    const run = response.body as RunSummary;
    expect(run).toMatchObject({
      batchId: batch.id,
      batchNumber: batch.batchNumber,
      isRehearsal: false,
      status: 'running',
      outcome: null,
      probeId: null,
      coolantC: 13,
      lastSeq: 1,
      currentStepTitle: 'Check the kit',
      alertStage: null,
      clock: { rate: 1, anchorRunMs: run.startedAtMs, anchorWallMs: run.startedAtMs },
    });
    const [started] = await eventsOf(run);
    expect(started).toMatchObject({ seq: 1, type: 'run.started', by: hand.member.id, sentBy: hand.member.id });
    const state = foldRun([started!]);
    expect(state.sheet?.volumeL).toBe(usualDocument.volumeL);
    expect(state.document).toEqual(usualDocument);
    expect(state.kit).toMatchObject({ kettle: { volumeL: expect.any(Number) }, chiller: { coolantC: 13 } });
    expect(state.steps.map(({ step }) => step.id)).toContain('hops-in');
    expect((await call('get', `/batches/${batch.id}`)).body).toMatchObject({ status: 'running', run: { id: run.id } });
    expect((await call('get', `/runs/${run.id}`)).body).toEqual(run);
    expect((await call('get', '/runs?status=running')).body).toContainEqual(run);
    expect((await call('get', '/runs?status=ended')).body).not.toContainEqual(run);
    expectProblem(await call('get', '/runs?status=paused'), 'not-valid', ['/status']);
  });

  it('begins one run a batch, however many start it at once', async () => {
    const { batch } = await buildBatch(testApp, { author: brewer });
    const responses = await Promise.all(Array.from({ length: 5 }, () => call('post', `/batches/${batch.id}/runs`)));
    expect(responses.filter(({ status }) => status === 201)).toHaveLength(1);
    for (const response of responses.filter(({ status }) => status !== 201))
      expectProblem(response, 'batch-already-running');
  });

  it('begins again after a run that was given up, and not after one that was finished', async () => {
    const { run, batch } = await buildRun(testApp, { author: brewer });
    const ended = buildEvent(run, brewer, 'run.ended', { outcome: 'abandoned' });
    await append(run, [ended]);
    expect((await call('get', `/batches/${batch.id}`)).body).toMatchObject({ status: 'abandoned' });
    const second = (await call('post', `/batches/${batch.id}/runs`).expect(201)).body as RunSummary;
    const { refused } = await append(run, [
      buildEvent(run, brewer, 'event.undone', { eventId: ended.id }),
      note(run, 'x'),
    ]);
    expect(refused).toMatchObject([{ problem: { type: '/problems/batch-already-running' } }]);

    await append(second, [buildEvent(second, brewer, 'run.ended', { outcome: 'finished' })]);
    expectProblem(await call('post', `/batches/${batch.id}/runs`), 'batch-already-running');
    const { status, run: shown } = (await call('get', `/batches/${batch.id}`)).body as BatchAnswer;
    expect([status, shown?.id]).toEqual(['finished', second.id]);
  });
});

describe('POST /api/runs/:id/events', () => {
  it('writes facts in order, with who delivered them, and moves the lists along', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const events = [done(run, 'check-kit', hand), done(run, 'fill'), note(run, 'Half an hour late.')];
    const { stored, refused } = await append(run, events, hand);
    expect(refused).toEqual([]);
    expect(stored).toEqual(
      events.map(({ id }, index) => ({
        id,
        seq: index + 2,
        receivedAtMs: expect.any(Number) as number,
        sentBy: hand.member.id,
      })),
    );
    expect(await eventsOf(run, 1)).toEqual(events.map((event, index) => ({ ...event, ...stored[index] })));
    expect((await call('get', `/runs/${run.id}`)).body).toMatchObject({
      lastSeq: 4,
      currentStepTitle: 'Light the heat',
    });
    expectProblem(await call('get', `/runs/${run.id}/events?afterSeq=-1`), 'not-valid', ['/afterSeq']);
  });

  it('acknowledges what it knows with the place it has', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const event = done(run, 'check-kit');
    const first = await append(run, [event]);
    const again = await append(run, [event, note(run, 'new'), event], hand);
    expect(again.stored).toHaveLength(2);
    expect(again.stored[0]).toEqual(first.stored[0]);
    expect(await eventsOf(run)).toHaveLength(3);
  });

  it('writes one row for fifty sends of one fact at once, and acknowledges all fifty', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const event = done(run, 'check-kit');
    const answers = await Promise.all(Array.from({ length: 50 }, () => append(run, [event])));
    expect(new Set(answers.map(({ stored }) => JSON.stringify(stored))).size).toBe(1);
    expect(answers.every(({ refused }) => refused.length === 0)).toBe(true);
    expect(await modelOf(testApp, RunEventRow).count({ where: { id: event.id } })).toBe(1);
    expect((await eventsOf(run)).map(({ seq }) => seq)).toEqual([1, 2]);
  });

  it('gives fifty facts at once fifty places without a hole', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const events = Array.from({ length: 50 }, (_, index) => note(run, `note ${index}`));
    await Promise.all(events.map((event) => append(run, [event])));
    expect((await eventsOf(run)).map(({ seq }) => seq)).toEqual(Array.from({ length: 51 }, (_, index) => index + 1));
  });

  it('takes what is good from among what is bad, and says what is wrong with each', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const { run: other } = await buildRun(testApp, { author: brewer });
    const stranger = await signInAs(testApp, 'brewer');
    const known = note(run, 'known');
    await append(run, [known]);
    const elsewhere = note(other, 'elsewhere');
    await append(other, [elsewhere]);
    const [started] = await eventsOf(run);
    const good = [done(run, 'check-kit'), note(run, 'good')];
    const bad: [Record<string, unknown>, string][] = [
      [{ ...note(run, ''), atMs: 1.5 }, 'not-valid'],
      [{ id: newId(), type: 'nonsense' }, 'not-valid'],
      [note(run, 'other run', { runId: other.id }), 'not-valid'],
      [buildEvent(run, stranger, 'note.added', { stepId: null, text: 'from elsewhere' }), 'not-valid'],
      [buildEvent(run, null, 'note.added', { stepId: null, text: 'by nobody' }), 'not-valid'],
      [{ ...started, id: newId(), seq: undefined, receivedAtMs: undefined, sentBy: undefined }, 'not-allowed'],
      [buildEvent(run, brewer, 'clock.changed', { clock: { ...run.clock, rate: 30 } }), 'not-allowed'],
      [{ ...known, payload: { stepId: null, text: 'changed' } }, 'event-id-taken'],
      [note(run, 'taken', { id: elsewhere.id }), 'event-id-taken'],
    ];
    const sent = [good[0]!, ...bad.map(([event]) => event), good[1]!];
    const { stored, refused } = await append(run, sent);
    expect(stored.map(({ id }) => id)).toEqual(good.map(({ id }) => id));
    const types = new Map(refused.map(({ id, problem }) => [id, problem.type]));
    for (const [event, type] of bad)
      expect(types.get(event['id'] as string), JSON.stringify(event)).toBe(`/problems/${type}`);
    expect(refused).toHaveLength(bad.length);
    expect(refused[0]?.problem.errors?.map(({ pointer }) => pointer).sort()).toEqual(['/atMs', '/payload/text']);
  });

  it('refuses a call that is no list of events', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const send = (body: object) => call('post', `/runs/${run.id}/events`).send(body);
    expectProblem(await send({ events: [] }), 'not-valid', ['/events']);
    expectProblem(await send({}), 'not-valid', ['/events']);
    expectProblem(await send({ events: [{ type: 'note.added' }] }), 'not-valid', ['/events/0/id']);
    const many = Array.from({ length: 501 }, () => note(run, 'x'));
    expectProblem(await send({ events: many }), 'not-valid', ['/events']);
    expect((await append(run, many.slice(1))).stored).toHaveLength(500);
  });

  it('refuses a taster, and hides the run from another house', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const send = (who: SignedInMember) =>
      call('post', `/runs/${run.id}/events`, who).send({ events: [note(run, 'x')] });
    expectProblem(await send(await signInAs(testApp, 'taster', { house: brewer.house })), 'not-allowed');
    expectProblem(await send(await signInAs(testApp, 'pourer', { house: brewer.house })), 'not-allowed');
    const stranger = await signInAs(testApp, 'owner');
    expectProblem(await send(stranger), 'run-not-found');
    for (const path of ['', '/events', '/readings'])
      expectProblem(await call('get', `/runs/${run.id}${path}`, stranger), 'run-not-found');
    expect((await call('get', '/runs', stranger)).body).toEqual([]);
    expectProblem(await call('get', `/runs/${newId()}`), 'run-not-found');
    expect(await eventsOf(run)).toHaveLength(1);
  });

  it('takes a fact of somebody who has left the house since', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const gone = await signInAs(testApp, 'hand', { house: brewer.house });
    await gone.member.update({ isActive: false });
    const { stored } = await append(run, [done(run, 'check-kit', gone)]);
    expect(stored).toMatchObject([{ sentBy: brewer.member.id }]);
  });

  it('takes late facts after the end, and shows them as what they are', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const late = done(run, 'check-kit');
    await append(run, [buildEvent(run, brewer, 'run.ended', { outcome: 'finished' }), late]);
    const state = foldRun(await eventsOf(run));
    expect(state.status).toBe('ended');
    expect(state.conflicts).toMatchObject([{ kind: 'after-end', stepId: 'check-kit' }]);
    expect((await call('get', `/runs/${run.id}`)).body).toMatchObject({ status: 'ended', outcome: 'finished' });
    const ended = await call('get', '/runs?status=ended');
    expect((ended.body as RunSummary[]).map(({ id }) => id)).toContain(run.id);
  });

  it('undoes: an act, and the end of a run', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    const act = done(run, 'check-kit');
    const end = buildEvent(run, brewer, 'run.ended', { outcome: 'abandoned', reason: 'no gas' });
    await append(run, [act, buildEvent(run, brewer, 'event.undone', { eventId: act.id }), end]);
    expect((await call('get', `/runs/${run.id}`)).body).toMatchObject({ status: 'ended', outcome: 'abandoned' });
    await append(run, [buildEvent(run, brewer, 'event.undone', { eventId: end.id })]);
    expect((await call('get', `/runs/${run.id}`)).body).toMatchObject({
      status: 'running',
      outcome: null,
      endedAtMs: null,
      currentStepTitle: 'Check the kit',
    });
  });

  it('keeps an event of the future as it is, and the row of the run says what the log says', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    await modelOf(testApp, RunEventRow).create({
      ...{ runId: run.id, seq: 2, id: newId(), type: 'kettle.renamed', v: 3, atMs: Date.now(), by: null },
      ...{ station: 'tablet', sentBy: null, receivedAtMs: Date.now(), payload: { name: 'Bertha' } },
    });
    await modelOf(testApp, Run).update({ lastSeq: 2 }, { where: { id: run.id } });
    const { stored } = await append(run, [done(run, 'check-kit')]);
    expect(stored).toMatchObject([{ seq: 3 }]);
    expect((await eventsOf(run))[1]).toMatchObject({ type: 'kettle.renamed', v: 3, payload: { name: 'Bertha' } });
    const row = await modelOf(testApp, Run).findByPk(run.id);
    expect(row).toMatchObject({ lastSeq: 3, currentStepTitle: 'Fill the kettle' });
  });
});

describe('GET /api/runs/:id/readings', () => {
  it('gives the readings of the run, thinned without losing a spike', async () => {
    const { run, deviceToken } = await buildRun(testApp, { author: brewer });
    const push = (readings: { atMs: number; tempC: number | null }[]) =>
      request(testApp.url)
        .post('/api/device/readings')
        .set('authorization', `Bearer ${deviceToken}`)
        .send({ readings })
        .expect(200);
    const earlier = { atMs: run.startedAtMs - 1000, tempC: 10 };
    const readings = Array.from({ length: 400 }, (_, index) => ({ atMs: run.startedAtMs + index * 100, tempC: 20 }));
    readings[222] = { atMs: readings[222]!.atMs, tempC: 99 };
    await push([...readings, earlier]);
    const get = async (query = '') =>
      (await call('get', `/runs/${run.id}/readings${query}`).expect(200)).body as object;
    expect(await get()).toEqual({ runId: run.id, probeId: run.probeId, readings, totalCount: 400 });
    const part = readings.slice(10, 21);
    expect(await get(`?fromMs=${part[0]!.atMs}&toMs=${part.at(-1)!.atMs}`)).toMatchObject({ readings: part });
    const thin = (await get('?buckets=10')) as { readings: RunEvent[]; totalCount: number };
    expect(thin.readings.length).toBeLessThan(35);
    expect(thin.readings).toContainEqual(readings[222]);
    expect(thin.totalCount).toBe(400);
    expectProblem(await call('get', `/runs/${run.id}/readings?buckets=2`), 'not-valid', ['/buckets']);
  });

  it('ends soon after the probe came out of the kettle: by then it may be in the next one', async () => {
    const { run, deviceToken } = await buildRun(testApp, { author: brewer });
    const readings = Array.from({ length: 21 }, (_, second) => ({ atMs: run.startedAtMs + second * 1000, tempC: 20 }));
    await request(testApp.url)
      .post('/api/device/readings')
      .set('authorization', `Bearer ${deviceToken}`)
      .send({ readings })
      .expect(200);
    // Two minutes of grace end ten seconds after the start.
    await append(run, [done(run, 'transfer', brewer, { atMs: run.startedAtMs - 110_000 })]);
    const { body } = await call('get', `/runs/${run.id}/readings`).expect(200);
    expect(body).toMatchObject({ readings: readings.slice(0, 11), totalCount: 11 });
  });
});
