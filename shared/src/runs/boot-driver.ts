import type { Reading } from '../readings/index.js';
import { driveRun, startDriver, type DriverConfig, type RunDriver } from './driver.js';
import type { LogEntry, RunEvent } from './events.js';
import { foldRun, inLogOrder } from './fold.js';

/** Older turns than this many do not change what the watch believes now. */
const TURNS = 24;

export interface BootInput {
  config: DriverConfig;
  entries: readonly LogEntry[];
  /** The last quarter of an hour, in order of time. */
  readings: readonly Reading[];
  /** Run clock. */
  nowMs: number;
  runId: string;
  station: string;
}

/**
 * A driver that has seen the readings at hand, each under the state of the run at its time: what the kettle was told decides
 * how the watch reads a slope. Facts that follow from what was before the last turn are old news and left out.
 */
export function bootDriver({ config, entries, readings, nowMs, runId, station }: BootInput): {
  driver: RunDriver;
  events: RunEvent[];
} {
  const ordered = inLogOrder(entries);
  const firstMs = readings[0]?.atMs ?? nowMs;
  const turns = ordered
    .filter((entry) => isTurn(entry) && entry.atMs > firstMs)
    .map(({ atMs }) => atMs)
    .slice(-TURNS);

  let driver = startDriver(config);
  let from = 0;
  for (const turnMs of new Set(turns.sort((a, b) => a - b))) {
    let to = from;
    while (to < readings.length && readings[to]!.atMs < turnMs) to += 1;
    if (to === from) continue;
    const state = foldRun(ordered.filter(({ atMs }) => atMs < turnMs));
    const part = readings.slice(from, to);
    driver = driveRun(driver, state, { runId, station, readings: part, nowMs: part.at(-1)!.atMs }).driver;
    from = to;
  }
  return driveRun(driver, foldRun(ordered), { runId, station, readings: readings.slice(from), nowMs });
}

/** What the watch and the ladders were told at that moment: acts, and that a level is waited for once more. */
function isTurn(entry: LogEntry): boolean {
  const event = entry as RunEvent;
  if (event.type === 'alert.raised') return event.payload.crossing > 1;
  return event.type === 'step.done' || event.type === 'event.undone';
}
