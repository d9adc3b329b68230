import type { RunSummary } from '@steepfall/shared/contracts';
import type { RunEventOf, StoredRunEvent } from '@steepfall/shared/runs';
import { runTimeAt } from '@steepfall/shared/timers';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { buildEvent, buildProbe, buildRun, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { startRehearsal } from '../../test/practice.js';
import { ask, closeSockets, collect, connectDevice, connectMember, until, type HubSocket } from '../../test/sockets.js';
import { RunLogService } from '../runs/run-log.service.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterEach(() => closeSockets());
afterAll(() => testApp.close());

const logs = () => testApp.app.get(RunLogService, { strict: false });
const eventsOf = async (run: RunSummary) => (await logs().get(brewer.house.id, run.id)).events;
const alertsOf = async (run: RunSummary, key: string) =>
  (await eventsOf(run))
    .filter((event): event is StoredRunEvent & RunEventOf<'alert.raised'> => event.type === 'alert.raised')
    .filter(({ payload }) => payload.key === key);
const doneUpTo = (run: RunSummary, lastStepId: string, atMs: number) => {
  const stepIds = [
    ...['check-kit', 'fill', 'light-heat', 'acid', 'ph', 'coil-in', 'heat', 'tea-in', 'steep', 'tea-out', 'chill'],
    ...['hops-in', 'hops-out', 'transfer'],
  ];
  const events = stepIds
    .slice(0, stepIds.indexOf(lastStepId) + 1)
    .map((stepId) => buildEvent(run, brewer, 'step.done', { stepId, cause: 'hand', tempC: null }, { atMs }));
  return logs().append(brewer.house.id, run.id, events, brewer.member.id);
};
const falling = (seconds: number) => Math.round((12 + 68 * Math.exp(-seconds / 400)) * 16) / 16;

/** A rehearsal whose thermometer is in the hands of the spec: one reading a second of run time along a curve. */
async function withProbeInHand(rate = 60) {
  const { probe, deviceToken } = await buildProbe(testApp, brewer.house);
  const run = await startRehearsal(testApp, brewer, { probeId: probe.id, rate });
  const device = await connectDevice(testApp, deviceToken);
  const nowMs = () => runTimeAt(run.clock, Date.now());
  const push = (readings: { atMs: number; tempC: number }[]) => ask(device, 'readings.push', { readings });
  const along = async (curve: (seconds: number) => number, isOver: () => Promise<boolean>) => {
    const startMs = nowMs();
    for (let sent = 0; !(await isOver());) {
      const due = Math.floor((nowMs() - startMs) / 1000);
      const seconds = Array.from({ length: due - sent }, (_, index) => sent + index + 1);
      if (seconds.length > 0)
        await push(seconds.map((second) => ({ atMs: startMs + second * 1000, tempC: curve(second) })));
      sent = due;
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
    return startMs;
  };
  return { run, nowMs, push, along };
}

describe('the supervision of a run', () => {
  it('raises the ladder in order, each rung once, in time, with no tablet looking', async () => {
    const { run, nowMs, along } = await withProbeInHand();
    await doneUpTo(run, 'chill', nowMs());
    const startMs = await along(falling, async () => (await alertsOf(run, 'hops-in')).length >= 4);
    const alerts = await alertsOf(run, 'hops-in');
    expect(alerts.map(({ payload }) => payload.stage)).toEqual(['coming-up', 'stand-by', 'now', 'missed']);
    const crossingMs = startMs + 400 * Math.log(68 / 50) * 1000;
    const [, , now, missed] = alerts;
    // A hand needs ten seconds.
    expect(crossingMs - now!.atMs).toBeGreaterThan(3_000);
    expect(crossingMs - now!.atMs).toBeLessThan(25_000);
    expect(missed!.atMs).toBeGreaterThan(crossingMs);
    for (const alert of alerts) expect(alert).toMatchObject({ by: null, sentBy: null, station: 'hub' });
  });

  it('says that a probe is silent while a level is waited for, and that it is back', async () => {
    const { run, nowMs, push } = await withProbeInHand();
    await doneUpTo(run, 'chill', nowMs());
    await until(async () => (await alertsOf(run, 'signal')).length === 1);
    expect((await alertsOf(run, 'signal'))[0]).toMatchObject({
      payload: { stage: 'now', rule: 'signal', crossing: 1 },
    });
    const isBack = async () => (await eventsOf(run)).some(({ type }) => type === 'alert.cleared');
    const startMs = nowMs();
    await until(async () => {
      await push([{ atMs: nowMs(), tempC: falling((nowMs() - startMs) / 1000) }]);
      return isBack();
    });
    expect(await alertsOf(run, 'signal')).toHaveLength(1);
  });

  it('is not misled by readings of the past: they are kept, and call nobody', async () => {
    const { run, deviceToken, probe } = await buildRun(testApp, { author: brewer });
    const nowMs = Date.now();
    await doneUpTo(run, 'chill', nowMs);
    const device = await connectDevice(testApp, deviceToken);
    const old = Array.from({ length: 400 }, (_, second) => ({
      atMs: nowMs - 600_000 + second * 1000,
      tempC: falling(second),
    }));
    expect(await ask(device, 'readings.push', { readings: old })).toMatchObject({ accepted: 400 });
    await new Promise((resolve) => setTimeout(resolve, 1500));
    expect((await eventsOf(run)).filter(({ type }) => type === 'alert.raised')).toEqual([]);
    expect(logs().attachedTo(probe.id)?.id).toBe(run.id);
  });

  it('rings a timer once, and a tablet that finds the same is told that it is known', async () => {
    const { run, nowMs } = await withProbeInHand();
    const tablet: HubSocket = await connectMember(testApp, brewer);
    await ask(tablet, 'run.join', { runId: run.id, afterSeq: 0 });
    const told = collect(tablet, 'run.events');
    const timerId = run.id;
    const started = buildEvent(
      run,
      brewer,
      'timer.started',
      { timerId, label: 'acid', durationS: 60 },
      { atMs: nowMs() },
    );
    await ask(tablet, 'run.append', { runId: run.id, events: [started] });
    const rung = () =>
      told
        .flatMap(({ events }) => events)
        .filter((event): event is StoredRunEvent & RunEventOf<'alert.raised'> => event.type === 'alert.raised')
        .filter(({ payload }) => payload.key === `timer:${timerId}`);
    await until(() => rung().some(({ payload }) => payload.stage === 'missed'));
    const stages = rung().map(({ payload }) => payload.stage);
    expect(stages).toEqual([...new Set(stages)]);
    expect(stages).toContain('now');
    const { seq, receivedAtMs, sentBy, ...found } = rung()[0]!;
    expect([receivedAtMs > 0, sentBy]).toEqual([true, null]);
    const same = await ask(tablet, 'run.append', { runId: run.id, events: [found] });
    expect(same.stored).toMatchObject([{ id: found.id, seq }]);
    const alike = await ask(tablet, 'run.append', { runId: run.id, events: [{ ...found, station: 'tablet' }] });
    expect(alike.refused).toMatchObject([{ id: found.id, problem: { type: '/problems/event-id-taken' } }]);
  });

  it('writes an alert as soon as it can when the database was away', async () => {
    const { run, nowMs } = await withProbeInHand();
    const timer = { timerId: run.id, label: 'acid', durationS: 200 };
    const started = buildEvent(run, brewer, 'timer.started', timer, { atMs: nowMs() });
    await logs().append(brewer.house.id, run.id, [started], brewer.member.id);
    const append = vi.spyOn(logs(), 'append').mockRejectedValueOnce(new Error('away'));
    await until(() => append.mock.calls.length > 0);
    await until(async () => (await alertsOf(run, `timer:${run.id}`)).length > 0);
    append.mockRestore();
  });

  it('ends with the run', async () => {
    const { run, nowMs } = await withProbeInHand();
    await doneUpTo(run, 'chill', nowMs());
    const end = buildEvent(run, brewer, 'run.ended', { outcome: 'abandoned' }, { atMs: nowMs() });
    await logs().append(brewer.house.id, run.id, [end], brewer.member.id);
    const { length } = await eventsOf(run);
    await new Promise((resolve) => setTimeout(resolve, 1200));
    expect(await eventsOf(run)).toHaveLength(length);
  });
});
