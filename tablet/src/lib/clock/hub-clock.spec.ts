import { describe, expect, it, vi } from 'vitest';
import type { HubLink, LinkState } from '../socket/hub-link.ts';
import { ValueStore } from '../value-store.ts';
import { HubClock } from './hub-clock.ts';

/** A device whose clock is off, and a hub that answers after a while. */
function device({ skewMs = 0, roundTripMs = 8 } = {}) {
  const now = { wallMs: 1_790_000_000_000, monotonicMs: 5_000 };
  const pass = (ms: number) => {
    now.wallMs += ms;
    now.monotonicMs += ms;
  };
  const state = new ValueStore<LinkState>({ status: 'connected', sinceMs: 0, problem: null });
  const ask = vi.fn(async (_name: string, { sentMs }: { sentMs: number }) => {
    pass(roundTripMs / 2);
    const hubMs = now.wallMs + skewMs;
    pass(roundTripMs / 2);
    return { sentMs, hubMs };
  });
  const link = { state, ask, on: () => () => undefined } as unknown as HubLink;
  const clock = new HubClock({ wallMs: () => now.wallMs, monotonicMs: () => now.monotonicMs });
  return { now, pass, state, ask, link, clock };
}

describe(HubClock, () => {
  it('shows the time of the hub after eight questions', async () => {
    const { clock, link, ask, now } = device({ skewMs: 90_000 });
    clock.follow(link);
    await clock.sync();
    expect(ask).toHaveBeenCalledTimes(8);
    expect(clock.nowMs()).toBe(now.wallMs + 90_000);
    expect(clock.errorMs.get()).toBe(4);
  });

  it('asks again when the wall clock is set, and lets nothing ring until it knows why', async () => {
    const { clock, link, ask, now, pass } = device();
    clock.follow(link);
    await clock.sync();
    ask.mockClear();
    pass(250);
    clock.look();
    expect(clock.isSettled.get()).toBe(true);

    now.wallMs += 3_600_000;
    pass(250);
    clock.look();
    expect(clock.isSettled.get()).toBe(false);
    await clock.sync();
    expect(ask).toHaveBeenCalled();
    expect(clock.isSettled.get()).toBe(true);
  });

  it('believes its own clock again after three seconds without the hub', () => {
    const { clock, link, state, now, pass } = device();
    state.set({ status: 'away', sinceMs: 0, problem: null });
    clock.follow(link);
    now.wallMs += 600_000;
    pass(250);
    clock.look();
    pass(2_000);
    clock.look();
    expect(clock.isSettled.get()).toBe(false);
    pass(1_500);
    clock.look();
    expect(clock.isSettled.get()).toBe(true);
  });

  it('asks again every ten seconds until it gets an answer', async () => {
    const { clock, link, ask, pass } = device({ skewMs: 90_000 });
    ask.mockRejectedValue(new Error('no answer'));
    clock.follow(link);
    await clock.sync();
    expect(ask).toHaveBeenCalledTimes(1);
    pass(9_000);
    clock.look();
    await Promise.resolve();
    expect(ask).toHaveBeenCalledTimes(1);
    pass(1_000);
    clock.look();
    await clock.sync();
    expect(ask).toHaveBeenCalledTimes(2);
  });

  it('measures anew every ten minutes', async () => {
    const { clock, link, ask, pass } = device();
    clock.follow(link);
    await clock.sync();
    ask.mockClear();
    for (let i = 0; i < 21; i += 1) {
      pass(30_000);
      clock.look();
    }
    await clock.sync();
    expect(ask.mock.calls.length).toBeGreaterThanOrEqual(8);
  });
});
