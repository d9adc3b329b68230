import type { Reading } from '@steepfall/shared/readings';
import type { KettleRun } from '../kettle/index.js';
import type { FollowedScript } from './act-script.js';

/** Something that has readings in simulated time, ms from 0. */
export interface Source {
  /** When the next one is due; null at the end. */
  nextMs(): number | null;
  /** Everything due up to and including an instant. */
  take(untilMs: number): Reading[];
}

/** A trace in the order of its file: a reading that was recorded late is told late. */
export function traceSource(readings: readonly Reading[]): Source {
  let next = 0;
  let reachedMs = 0;
  const dueMs = () => {
    const reading = readings[next];
    return reading ? Math.max(reachedMs, reading.atMs) : null;
  };
  return {
    nextMs: dueMs,
    take(untilMs) {
      const from = next;
      for (let due = dueMs(); due !== null && due <= untilMs; due = dueMs()) {
        reachedMs = due;
        next += 1;
      }
      return readings.slice(from, next);
    },
  };
}

/** A kettle that is acted on by a script, up to an instant or for ever. */
export function kettleSource(
  run: KettleRun,
  script: FollowedScript,
  lastMs: number = Number.POSITIVE_INFINITY,
): Source {
  return {
    nextMs: () => (run.nextReadingAtMs <= lastMs ? run.nextReadingAtMs : null),
    take(untilMs) {
      const readings: Reading[] = [];
      while (run.nextReadingAtMs <= Math.min(untilMs, lastMs)) {
        const atMs = run.nextReadingAtMs;
        for (const { act, dueMs } of script.due(atMs, run.state.tempC)) run.act(act, dueMs);
        readings.push(...run.readingsUntil(atMs));
      }
      return readings;
    },
  };
}
