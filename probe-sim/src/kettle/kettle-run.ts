import type { Reading } from '@steepfall/shared/readings';
import { actOnKettle, advanceKettle, readProbe, startKettle, type KettleAct, type KettleState } from './kettle.js';
import type { KettleSetup } from './setup.js';

/**
 * A kettle on a run clock. It has no clock of its own: whoever drives it says how late it is, at any rate. The readings depend
 * only on the setup and on what was done when, not on how often it was asked.
 */
export interface KettleRun {
  readonly state: KettleState;
  /** Run clock of the next reading, epoch ms. */
  readonly nextReadingAtMs: number;
  /** Something is done at an instant of the run clock. One that lies before the last reading counts from that reading. */
  act(act: KettleAct, atMs: number): void;
  /** All readings due up to and including `atMs` that were not handed out before, oldest first. */
  readingsUntil(atMs: number): Reading[];
}

/** Starts a kettle at an instant of the run clock; the first reading is due at once. */
export function kettleRun(setup: KettleSetup, startAtMs: number): KettleRun {
  let state = startKettle(setup);
  let stateAtMs = startAtMs;
  let count = 0;
  let waiting: Reading[] = [];

  const dueMs = () => startAtMs + Math.round(count * setup.probe.samplePeriodS * 1000);
  const advanceTo = (atMs: number) => {
    state = advanceKettle(state, Math.max(0, atMs - stateAtMs) / 1000);
    stateAtMs = Math.max(stateAtMs, atMs);
  };
  const readUntil = (atMs: number) => {
    for (; dueMs() <= atMs; count += 1) {
      advanceTo(dueMs());
      waiting.push({ atMs: dueMs(), tempC: readProbe(state) });
    }
  };

  return {
    get state() {
      return state;
    },
    get nextReadingAtMs() {
      return dueMs();
    },
    act(act, atMs) {
      readUntil(atMs);
      advanceTo(atMs);
      state = actOnKettle(state, act);
    },
    readingsUntil(atMs) {
      readUntil(atMs);
      const due = waiting;
      waiting = [];
      return due;
    },
  };
}
