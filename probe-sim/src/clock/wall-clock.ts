import { setImmediate } from 'node:timers/promises';

/** The only source of real time, so that specs can bring their own. */
export interface WallClock {
  /** Epoch ms. */
  nowMs(): number;
  /** Resolves early, without an error, when the signal aborts. */
  sleep(durationMs: number, signal?: AbortSignal): Promise<void>;
}

export const systemClock: WallClock = {
  nowMs: () => Date.now(),
  sleep: (durationMs, signal) =>
    new Promise((resolve) => {
      if (signal?.aborted) return resolve();
      const done = () => {
        clearTimeout(timer);
        signal?.removeEventListener('abort', done);
        resolve();
      };
      const timer = setTimeout(done, Math.max(0, durationMs));
      signal?.addEventListener('abort', done, { once: true });
    }),
};

/** The clock of the hub, as seen from here. */
export function shiftedClock(clock: WallClock, offsetMs: number): WallClock {
  return { nowMs: () => clock.nowMs() + offsetMs, sleep: (durationMs, signal) => clock.sleep(durationMs, signal) };
}

/** A clock that jumps to the end of every wait: plays as fast as it can, and lets others have a turn. */
export function impatientClock(startMs: number): WallClock {
  let nowMs = startMs;
  return {
    nowMs: () => nowMs,
    async sleep(durationMs) {
      nowMs += Math.max(0, durationMs);
      await setImmediate();
    },
  };
}
