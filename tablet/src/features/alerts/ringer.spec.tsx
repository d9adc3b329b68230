import { act, render } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { buildTimerAlert, LogBuilder, RUN_ID, START_MS } from '@steepfall/shared/testing';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { isRinger, wantToRing } from '#lib/audio/ringer-lock.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import type { LiveState, RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { Ringer } from './ringer.tsx';

const letGo = vi.hoisted(() => vi.fn());
vi.mock('#lib/audio/alarm-sounds.ts', async () => {
  const { ValueStore: Store } = await import('#lib/value-store.ts');
  const state = new Store({ health: 'fine', ringing: null, wasInterrupted: false });
  return {
    alarmSounds: {
      state,
      start: vi.fn(),
      keepWarm: vi.fn(),
      ring: vi.fn(),
      prepareSpeech: vi.fn(),
      plan: vi.fn(),
    },
  };
});
vi.mock('#lib/audio/ringer-lock.ts', async () => {
  const { ValueStore: Store } = await import('#lib/value-store.ts');
  return { isRinger: new Store(true), wantToRing: vi.fn(() => letGo) };
});

/** Where the alert of a steep of three minutes says "tea out". */
const DUE_MS = START_MS + 180_000;
const running = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');
const alarmed = (key = 'steep') => running().add('alert.raised', buildTimerAlert({ key }));
const acknowledged = () => alarmed().add('alert.acknowledged', { key: 'steep', crossing: 1, stage: 'now' });

function ringerOf(log: LogBuilder) {
  const snapshot = new ValueStore({ state: foldRun(log.entries) });
  const live = new ValueStore<LiveState>({ nowMs: DUE_MS, view: null, newest: null });
  const store = { runId: RUN_ID, snapshot, live } as unknown as RunStore;
  render(
    <RunProvider store={store}>
      <Ringer />
    </RunProvider>,
  );
  const become = (next: LogBuilder) => act(() => snapshot.set({ state: foldRun(next.entries) }));
  const pass = (nowMs: number) => act(() => live.set({ nowMs, view: null, newest: null }));
  return { become, pass };
}

const setHealth = (health: 'fine' | 'blocked') =>
  alarmSounds.state.set({ health, ringing: null, wasInterrupted: false });
const lastRing = () => vi.mocked(alarmSounds.ring).mock.lastCall?.[0];

beforeEach(() => {
  vi.clearAllMocks();
  hubClock.isSettled.set(true);
  isRinger.set(true);
  setHealth('fine');
});
afterEach(() => {
  vi.useRealTimers();
});

describe(Ringer, () => {
  it('rings for what stands, in the name of its run', () => {
    ringerOf(alarmed());
    expect(wantToRing).toHaveBeenCalledWith(RUN_ID);
    expect(lastRing()).toEqual({ level: 'now', id: 'steep/1/now', say: ['tea-out', 'now'] });
  });

  it('starts nothing while the clock is unsettled, and falls silent all the same', () => {
    hubClock.isSettled.set(false);
    const { become } = ringerOf(running());
    become(alarmed());
    expect(lastRing()).toBeNull();
    hubClock.isSettled.set(true);
    expect(lastRing()).toMatchObject({ id: 'steep/1/now' });
    hubClock.isSettled.set(false);
    expect(lastRing()).toMatchObject({ id: 'steep/1/now' });
    become(acknowledged());
    expect(lastRing()).toBeNull();
  });

  it('lets another tab ring when its own sound stays blocked for a second', () => {
    vi.useFakeTimers();
    ringerOf(alarmed());
    setHealth('blocked');
    vi.advanceTimersByTime(900);
    setHealth('fine');
    vi.advanceTimersByTime(1_000);
    expect(letGo).not.toHaveBeenCalled();
    setHealth('blocked');
    vi.advanceTimersByTime(1_000);
    expect(letGo).toHaveBeenCalledOnce();
    setHealth('fine');
    expect(wantToRing).toHaveBeenCalledTimes(2);
  });

  it('keeps no other tab waiting once the run is over', () => {
    const { become } = ringerOf(alarmed());
    become(alarmed().add('run.ended', { outcome: 'finished' }));
    expect(letGo).toHaveBeenCalledOnce();
    expect(lastRing()).toBeNull();
  });

  it('tells how late it is when the tablet slept through the moment, and keeps to it', () => {
    const { become, pass } = ringerOf(running());
    pass(DUE_MS + 200_000);
    become(alarmed());
    expect(lastRing()).toEqual({ level: 'now', id: 'steep/1/now', say: ['tea-out', 'n3', 'minutes-late'] });
    pass(DUE_MS + 300_000);
    expect(lastRing()?.say).toEqual(['tea-out', 'n3', 'minutes-late']);
  });

  it('gets higher and faster when nobody answers, also once the moment is missed', () => {
    vi.useFakeTimers({ toFake: ['Date'] });
    const { become, pass } = ringerOf(alarmed());
    vi.setSystemTime(Date.now() + 19_000);
    pass(DUE_MS + 1_000);
    expect(lastRing()?.level).toBe('now');
    vi.setSystemTime(Date.now() + 1_000);
    pass(DUE_MS + 2_000);
    expect(lastRing()).toMatchObject({ level: 'urgent', id: 'steep/1/now' });
    become(alarmed().add('alert.raised', buildTimerAlert({ stage: 'missed' })));
    expect(lastRing()).toMatchObject({ level: 'urgent', id: 'steep/1/missed' });
    become(acknowledged());
    expect(lastRing()).toBeNull();
  });

  it('puts the next call on the audio clock, and only that', () => {
    const { become, pass } = ringerOf(running());
    const steep = foldRun(running().entries).steps.find(({ step }) => step.id === 'steep');
    const endsAtMs =
      (steep?.startedAtMs ?? 0) + (steep?.step.done.by === 'timer' ? steep.step.done.durationS * 1000 : 0);
    pass(endsAtMs - 40_000);
    const reachS = foldRun(running().entries).steps.find(({ step }) => step.id === 'tea-out')?.step.reachS ?? 0;
    expect(vi.mocked(alarmSounds.plan).mock.lastCall?.[0]).toEqual({
      inS: 40 - reachS,
      ring: { level: 'now', id: 'steep/1/now', say: ['tea-out', 'now'] },
    });
    become(alarmed());
    expect(vi.mocked(alarmSounds.plan).mock.lastCall?.[0]).toBeNull();
  });
});
