import { act, render } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { foldRun } from '@steepfall/shared/runs';
import { buildTimerAlert, LogBuilder, RUN_ID } from '@steepfall/shared/testing';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { isRinger, wantToRing } from '#lib/audio/ringer-lock.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { RunProvider } from '#lib/run-store/run-context.tsx';
import type { RunStore } from '#lib/run-store/run-store.ts';
import { ValueStore } from '#lib/value-store.ts';
import { Ringer } from './ringer.tsx';

const letGo = vi.hoisted(() => vi.fn());
vi.mock('#lib/audio/alarm-sounds.ts', async () => {
  const { ValueStore: Store } = await import('#lib/value-store.ts');
  const state = new Store({ health: 'fine', ringing: null });
  return {
    alarmSounds: {
      state,
      start: vi.fn(),
      keepWarm: vi.fn(),
      ring: vi.fn(),
      prepareSpeech: vi.fn(async () => undefined),
    },
  };
});
vi.mock('#lib/audio/ringer-lock.ts', async () => {
  const { ValueStore: Store } = await import('#lib/value-store.ts');
  return { isRinger: new Store(true), wantToRing: vi.fn(() => letGo) };
});

const running = () => new LogBuilder().done('light-heat', 'heat', 'tea-in');
const alarmed = (key = 'steep') => running().add('alert.raised', buildTimerAlert({ key }));
const acknowledged = () => alarmed().add('alert.acknowledged', { key: 'steep', crossing: 1, stage: 'now' });

function ringerOf(log: LogBuilder) {
  const snapshot = new ValueStore({ state: foldRun(log.entries) });
  const store = { runId: RUN_ID, snapshot } as unknown as RunStore;
  render(
    <RunProvider store={store}>
      <Ringer />
    </RunProvider>,
  );
  const become = (next: LogBuilder) => act(() => snapshot.set({ state: foldRun(next.entries) }));
  return { become };
}

const setHealth = (health: 'fine' | 'blocked') => alarmSounds.state.set({ health, ringing: null });
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
});
