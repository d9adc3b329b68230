import type { Reading } from '@steepfall/shared/readings';
import type { Pace, WallClock } from '../clock/index.js';
import type { FaultyLine } from '../faults/index.js';
import type { Sink } from '../transport/forwarder.js';
import type { Source } from './source.js';

/** Looked at again after this long even if nothing is due: the pace may have changed. */
const LONGEST_WAIT_MS = 500;

export interface Playing {
  source: Source;
  line: FaultyLine;
  sink: Sink;
  clock: WallClock;
  /** May change while it plays. */
  pace: () => Pace;
  signal: AbortSignal;
}

/** Plays a source through a faulty line to a sink until it ends, is stopped, or the sink fails. */
export async function play({ source, line, sink, clock, pace, signal }: Playing): Promise<void> {
  const offer = (readings: Reading[]) => {
    if (readings.length === 0) return;
    sink.offer(readings.map(({ atMs, tempC }) => ({ atMs: pace().stampMs(atMs), tempC })));
  };
  for (let nextMs = source.nextMs(); nextMs !== null && !signal.aborted && !sink.failure; nextMs = source.nextMs()) {
    const waitMs = pace().dueWallMs(nextMs) - clock.nowMs();
    if (waitMs > 0) {
      await clock.sleep(Math.min(waitMs, LONGEST_WAIT_MS), signal);
      continue;
    }
    const readings = source.take(Math.max(nextMs, pace().simulatedMs(clock.nowMs())));
    offer(readings.flatMap((reading) => line.pass(reading)));
  }
  offer(line.rest());
}
