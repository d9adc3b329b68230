import type { RunEvents, RunLearned, RunSummary } from '@steepfall/shared/contracts';
import { foldRun } from '@steepfall/shared/runs';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildEvent, buildRun, modelOf, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { Probe } from '../probes/models/probe.model.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterAll(() => testApp.close());

const learnedOf = (run: RunSummary, who: SignedInMember = brewer) =>
  request(testApp.url).get(`/api/runs/${run.id}/learned`).set('authorization', who.bearer);
const append = (run: RunSummary, events: object[]) =>
  request(testApp.url)
    .post(`/api/runs/${run.id}/events`)
    .set('authorization', brewer.bearer)
    .send({ events })
    .expect(200);
const setReach = (who: SignedInMember, reachS: unknown) =>
  request(testApp.url).patch('/api/me/reach').set('authorization', who.bearer).send({ reachS });

/** Calls answered so many seconds after `now`, one after the other. */
function answeredCalls(run: RunSummary, waitsS: number[]): object[] {
  const steps = ['tea-in', 'tea-out', 'hops-in', 'hops-out'];
  return waitsS.flatMap((waitS, index) => {
    const actStepId = steps[index]!;
    const atMs = run.startedAtMs + index * 100;
    const call = {
      key: actStepId,
      crossing: 1,
      rule: 'temperature',
      stage: 'now',
      stepId: actStepId,
      actStepId,
    } as const;
    const level = { tempC: 80, targetC: 82, direction: 'rising', dueAtMs: null } as const;
    return [
      buildEvent(run, null, 'alert.raised', { ...call, ...level }, { atMs }),
      buildEvent(
        run,
        brewer,
        'step.done',
        { stepId: actStepId, cause: 'hand', tempC: null },
        { atMs: atMs + waitS * 1000 },
      ),
    ];
  });
}

const ended = (run: RunSummary) => buildEvent(run, brewer, 'run.ended', { outcome: 'finished' });

describe('GET /api/runs/:id/learned', () => {
  it('needs a sign-in, a run of this house, and its end', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    expectProblem(await request(testApp.url).get(`/api/runs/${run.id}/learned`), 'not-signed-in');
    expectProblem(await learnedOf(run, await signInAs(testApp, 'taster', { house: brewer.house })), 'not-allowed');
    expectProblem(await learnedOf(run, await signInAs(testApp, 'owner')), 'run-not-found');
    expectProblem(await learnedOf(run), 'run-not-ended');
  });

  it('says why it is too little to say, and how long a person took', async () => {
    const { run } = await buildRun(testApp, { author: brewer });
    await append(run, [...answeredCalls(run, [7, 8, 9, 8.2]), ended(run)]);
    const answer = await learnedOf(run);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({
      runId: run.id,
      isRehearsal: false,
      lagS: { told: 7.5, learned: null, because: 'no-readings' },
      coolingPerS: { told: null, learned: null },
      heaterEfficiency: { told: expect.any(Number) as number, learned: null },
      reach: [{ memberId: brewer.member.id, toldS: null, reachS: 9, answeredCount: 4, missedCount: 0 }],
    } satisfies Partial<Record<keyof RunLearned, unknown>>);
    expect((await learnedOf(run)).body).toEqual(answer.body);
  });
});

describe('what was saved', () => {
  it('times the next run of the person, and of nobody else', async () => {
    const other = await signInAs(testApp, 'brewer', { house: brewer.house });
    for (let n = 0; n < 2; n += 1) expect((await setReach(other, 14)).body).toMatchObject({ reachS: 14 });
    const reachOf = async ({ run }: { run: RunSummary }) => {
      const log = await request(testApp.url).get(`/api/runs/${run.id}/events`).set('authorization', brewer.bearer);
      const { steps } = foldRun((log.body as RunEvents).events);
      return [...new Set(steps.map(({ step }) => step.reachS))];
    };
    expect(await reachOf(await buildRun(testApp, { author: other }))).toEqual([14]);
    expect(await reachOf(await buildRun(testApp, { author: brewer }))).toEqual([10]);
    expect((await setReach(other, null)).body).toMatchObject({ reachS: null });
    expectProblem(await setReach(other, 2), 'not-valid', ['/reachS']);
    expectProblem(await setReach(other, 61), 'not-valid', ['/reachS']);
    expectProblem(await request(testApp.url).patch('/api/me/reach').send({ reachS: 9 }), 'not-signed-in');
  });

  it('tells the next run how sure the lag is, until somebody types another', async () => {
    const { probe } = await buildRun(testApp, { author: brewer });
    const facts = { name: 'P', resolutionC: 0.0625, samplePeriodS: 1, calibration: null };
    const save = (body: object) =>
      request(testApp.url).patch(`/api/probes/${probe.id}`).set('authorization', brewer.bearer).send(body).expect(200);
    const ratio = async () => (await modelOf(testApp, Probe).findByPk(probe.id))?.lagErrorRatio;
    await save({ ...facts, lagS: 6.2, lagErrorRatio: 0.14, version: 1 });
    expect(await ratio()).toBe(0.14);
    await save({ ...facts, name: 'Q', lagS: 6.2, version: 2 });
    expect(await ratio()).toBe(0.14);
    await save({ ...facts, lagS: 7, version: 3 });
    expect(await ratio()).toBeNull();
  });
});
