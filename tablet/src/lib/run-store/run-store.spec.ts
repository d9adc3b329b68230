import { describe, expect, it, vi } from 'vitest';
import { buildTimerAlert, LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { currentStep, foldRun, standingAlerts, type RunCommand } from '@steepfall/shared/runs';
import { problem } from '@steepfall/shared/problems';
import { v7 as uuidv7 } from 'uuid';
import { FakeHub, type FakeLink } from '../../testing/fake-hub.ts';
import type { EventStore } from '../event-store/event-store.ts';
import { MemoryEventStore } from '../event-store/memory-event-store.ts';
import { ValueStore } from '../value-store.ts';
import { Outbox } from './outbox.ts';
import { RunStore } from './run-store.ts';

/** A tablet with a clock of its own, on a hub's run. */
async function tablet(
  link: FakeLink,
  { store = new MemoryEventStore() as EventStore, station = 'tablet', nowMs = START_MS } = {},
) {
  const time = { nowMs };
  const isSettled = new ValueStore(true);
  const outbox = new Outbox(link, store);
  const run = new RunStore({
    runId: RUN_ID,
    link,
    store,
    outbox,
    clock: { nowMs: () => time.nowMs, isSettled, look: () => undefined },
    station,
    memberId: () => MEMBER_ID,
    newId: uuidv7,
    schedule: (work) => work(),
  });
  await run.open();
  await settle();
  const act = async (command: RunCommand) => {
    const decision = await run.act(command);
    await settle();
    return decision;
  };
  return { run, store, outbox, time, isSettled, act, state: () => run.snapshot.get().state };
}

/** Lets every promise in flight come home. */
async function settle(): Promise<void> {
  for (let i = 0; i < 60; i += 1) await Promise.resolve();
}

const steeping = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');
const complete = (stepId: string): RunCommand => ({ type: 'completeStep', stepId, tempC: 75 });

describe(RunStore, () => {
  it('joins and shows the run as the hub has it', async () => {
    const hub = new FakeHub(RUN_ID, steeping().stored);
    const { run, state } = await tablet(hub.connect());
    expect(run.snapshot.get()).toMatchObject({ phase: 'open', isJoined: true, pendingCount: 0 });
    expect(currentStep(state())?.step.id).toBe('steep');
  });

  it('shows an act at once and has it on the hub after', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const { run, act, state } = await tablet(hub.connect());
    await act(complete('light-heat'));
    expect(currentStep(state())?.step.id).toBe('heat');
    expect(run.snapshot.get().pendingCount).toBe(0);
    expect(hub.log.at(-1)).toMatchObject({ type: 'step.done', payload: { stepId: 'light-heat' } });
  });

  it('decides one act after the other: two quick taps do one step', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const { run } = await tablet(hub.connect());
    const [first, second] = await Promise.all([run.act(complete('light-heat')), run.act(complete('light-heat'))]);
    expect([first.ok, second.ok]).toEqual([true, false]);
  });

  it('goes on without the hub, and is the same on both sides when it is back', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const link = hub.connect();
    const { run, act, state } = await tablet(link);
    link.setConnected(false);
    for (const stepId of ['light-heat', 'heat', 'tea-in']) await act(complete(stepId));
    expect(currentStep(state())?.step.id).toBe('steep');
    expect(run.snapshot.get()).toMatchObject({ isJoined: false, pendingCount: 3 });

    hub.append([
      { ...new LogBuilder().add('note.added', { stepId: null, text: 'from the other tablet' }).last, id: uuidv7() },
    ]);
    link.setConnected(true);
    await settle();
    expect(run.snapshot.get()).toMatchObject({ isJoined: true, pendingCount: 0 });
    expect(state().notes).toHaveLength(1);
    expect(state()).toEqual(foldRun(hub.log));
    expect(link.joins).toEqual([0, 1]);
  });

  it('keeps every act through a reload without the hub', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const link = hub.connect();
    const before = await tablet(link);
    link.setConnected(false);
    await before.act(complete('light-heat'));
    before.run.close();

    const after = await tablet(link, { store: before.store });
    expect(after.run.snapshot.get()).toMatchObject({ phase: 'open', isJoined: false, pendingCount: 1 });
    expect(currentStep(after.state())?.step.id).toBe('heat');
    link.setConnected(true);
    await settle();
    expect(hub.log).toHaveLength(2);
  });

  it('asks again when an event is missing in between', async () => {
    vi.useFakeTimers();
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const link = hub.connect();
    const { state } = await tablet(link);
    const log = new LogBuilder().done('light-heat').add('note.added', { stepId: null, text: 'later' });
    hub.log.push(log.stored[1]!, log.stored[2]!);
    hub.broadcast('run.events', { runId: RUN_ID, events: [log.stored[2]!] });
    await vi.advanceTimersByTimeAsync(600);
    vi.useRealTimers();
    await settle();
    expect(link.joins).toEqual([0, 1]);
    expect(state()).toEqual(foldRun(hub.log));
  });

  it('agrees with another tablet after each act', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const one = await tablet(hub.connect(), { station: 'one' });
    const two = await tablet(hub.connect(), { station: 'two' });
    await one.act(complete('light-heat'));
    expect(currentStep(two.state())?.step.id).toBe('heat');
    await two.act({ type: 'goBack' });
    expect(currentStep(one.state())?.step.id).toBe('light-heat');
    expect(one.state()).toEqual(two.state());
  });

  it('rings its own timers with the hub away: coming up, stand by, now, once each', async () => {
    const hub = new FakeHub(RUN_ID, steeping().stored);
    const link = hub.connect();
    const { run, time, state } = await tablet(link);
    link.setConnected(false);
    await settle();
    const seen: string[] = [];
    for (let s = 1; s <= 178; s += 1) {
      time.nowMs = START_MS + s * 1000;
      run.tick();
      await settle();
      const stage = standingAlerts(state()).find(({ rule }) => rule === 'timer')?.stage;
      if (stage && seen.at(-1) !== stage) seen.push(stage);
    }
    expect(seen).toEqual(['coming-up', 'stand-by', 'now']);
    time.nowMs = START_MS + 181_000;
    run.tick();
    await settle();
    expect(currentStep(state())?.step.id).toBe('tea-out');

    link.setConnected(true);
    await settle();
    const stages = hub.log.flatMap(({ type, payload }) =>
      'stage' in payload && type === 'alert.raised' && payload.rule === 'timer' ? [payload.stage] : [],
    );
    expect(stages).toEqual(['coming-up', 'stand-by', 'now']);
    expect(state()).toEqual(foldRun(hub.log));
  });

  it('says so when no reading comes in while a level is waited for, and takes it back when one does', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().done('light-heat').stored);
    const link = hub.connect();
    const { run, time, state } = await tablet(link);
    link.setConnected(false);
    for (let s = 1; s <= 40; s += 1) {
      time.nowMs = START_MS + s * 1000;
      run.tick();
      await settle();
    }
    expect(standingAlerts(state())).toMatchObject([{ rule: 'signal', stage: 'now' }]);
    link.setConnected(true);
    await settle();
    for (let s = 41; s <= 60; s += 1) {
      time.nowMs = START_MS + s * 1000;
      const readings = [{ atMs: time.nowMs, tempC: 20 }];
      hub.broadcast('run.readings', { runId: RUN_ID, probeId: RUN_ID, readings, acceptedMs: time.nowMs });
    }
    link.setConnected(false);
    run.tick();
    await settle();
    expect(standingAlerts(state())).toEqual([]);
  });

  it('raises an alert itself when the hub, joined, says nothing for two seconds', async () => {
    vi.useFakeTimers({ toFake: ['Date'] });
    const hub = new FakeHub(RUN_ID, new LogBuilder().done('light-heat').stored);
    const { run, time, state } = await tablet(hub.connect());
    time.nowMs = START_MS;
    run.tick();
    time.nowMs = START_MS + 40_000;
    vi.setSystemTime(Date.now() + 3_000);
    run.tick();
    await settle();
    expect(run.snapshot.get().isJoined).toBe(true);
    expect(standingAlerts(state())).toEqual([]);
    vi.setSystemTime(Date.now() + 1_900);
    run.tick();
    await settle();
    expect(standingAlerts(state())).toEqual([]);
    vi.setSystemTime(Date.now() + 200);
    run.tick();
    await settle();
    vi.useRealTimers();
    expect(standingAlerts(state())).toMatchObject([{ rule: 'signal', stage: 'now' }]);
    expect(hub.log.at(-1)).toMatchObject({ type: 'alert.raised', payload: { rule: 'signal' } });
  });

  it('keeps to itself that the hub is lost, and tells it together with its end', async () => {
    vi.useFakeTimers({ toFake: ['performance'] });
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const link = hub.connect();
    const { run, time, state } = await tablet(link);
    link.setConnected(false);
    for (let s = 0; s <= 11; s += 1) {
      vi.advanceTimersByTime(1_000);
      time.nowMs += 1_000;
      run.tick();
      await settle();
    }
    expect(standingAlerts(state())).toMatchObject([{ rule: 'hub', key: 'hub:tablet' }]);
    expect(hub.log).toHaveLength(1);
    link.setConnected(true);
    await settle();
    vi.useRealTimers();
    expect(standingAlerts(state())).toEqual([]);
    expect(hub.log.map(({ type }) => type)).toEqual(['run.started', 'alert.raised', 'alert.cleared']);
  });

  it('rings once for a deadline that passed while it slept', async () => {
    const hub = new FakeHub(RUN_ID, steeping().stored);
    const link = hub.connect();
    const { run, time, state } = await tablet(link);
    link.setConnected(false);
    await settle();
    time.nowMs = START_MS + 360_000;
    run.tick();
    await settle();
    const standing = standingAlerts(state()).filter(({ rule }) => rule === 'timer');
    expect(standing).toMatchObject([{ stage: 'missed', dueAtMs: START_MS + 180_000 }]);
  });

  it('finds nothing out while nobody knows why its clock jumped', async () => {
    const hub = new FakeHub(RUN_ID, steeping().stored);
    const link = hub.connect();
    const { run, time, isSettled, state } = await tablet(link);
    isSettled.set(false);
    time.nowMs += 3_600_000;
    run.tick();
    await settle();
    expect(standingAlerts(state())).toEqual([]);
    time.nowMs = START_MS + 1_000;
    isSettled.set(true);
    run.tick();
    await settle();
    expect(standingAlerts(state())).toEqual([]);
  });

  it('one acknowledgement silences the other tablet', async () => {
    const log = steeping().add('alert.raised', buildTimerAlert());
    const hub = new FakeHub(RUN_ID, log.stored);
    const one = await tablet(hub.connect(), { station: 'one', nowMs: START_MS + 175_000 });
    const two = await tablet(hub.connect(), { station: 'two', nowMs: START_MS + 175_000 });
    expect(standingAlerts(two.state())).toHaveLength(1);
    await one.act({ type: 'acknowledgeAlert', key: 'steep', crossing: 1 });
    expect(standingAlerts(two.state())).toEqual([]);
  });

  it('shows a new reading without touching the log', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().done('light-heat').stored);
    const { run, time } = await tablet(hub.connect());
    const before = run.snapshot.get();
    for (let s = 1; s <= 20; s += 1) {
      time.nowMs = START_MS + s * 1000;
      const readings = [{ atMs: time.nowMs, tempC: 20 + s * 0.05 }];
      hub.broadcast('run.readings', { runId: RUN_ID, probeId: RUN_ID, readings, acceptedMs: time.nowMs });
    }
    expect(run.snapshot.get()).toBe(before);
    expect(run.live.get().view?.estimate).toMatchObject({ status: 'live', mode: 'climbing' });
    expect(run.live.get().newest).toEqual({ atMs: START_MS + 20_000, tempC: 21 });
  });

  it('draws the run from its own copy alone', async () => {
    const hub = new FakeHub(RUN_ID, steeping().stored);
    hub.readings.push(...Array.from({ length: 60 }, (_, s) => ({ atMs: START_MS - 60_000 + s * 1000, tempC: 76 })));
    const link = hub.connect();
    const before = await tablet(link);
    before.run.close();
    link.setConnected(false);
    const after = await tablet(link, { store: before.store });
    expect(after.run.snapshot.get().phase).toBe('open');
    expect(after.run.readings.all).toHaveLength(60);
    expect(after.run.live.get().view).not.toBeNull();
  });

  it('shows what was refused until a person drops it', async () => {
    const hub = new FakeHub(RUN_ID, new LogBuilder().stored);
    const link = hub.connect();
    const { run, outbox, act } = await tablet(link);
    link.setConnected(false);
    await act({ type: 'addNote', stepId: null, text: 'no' });
    const { id } = run.snapshot.get().entries.at(-1)!;
    hub.refusals.set(id, problem('not-valid', 'It does not fit.'));
    link.setConnected(true);
    await settle();
    expect(run.snapshot.get()).toMatchObject({ pendingCount: 0, parked: [{ eventId: id }] });
    await outbox.giveUp(RUN_ID, id);
    expect(run.snapshot.get().parked).toEqual([]);
  });

  it('says that there is no such run, and shows nothing of it', async () => {
    const hub = new FakeHub('0b7c6a1e-0000-4000-8000-000000000000');
    const { run } = await tablet(hub.connect());
    expect(run.snapshot.get()).toMatchObject({ phase: 'missing', problem: { status: 404 } });
  });
});
