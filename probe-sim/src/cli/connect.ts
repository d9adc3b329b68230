import { runTimeAt } from '@steepfall/shared/timers';
import { impatientClock, runClockPace, shiftedClock, wallPace, type Pace, type WallClock } from '../clock/index.js';
import { HubAwayError, HubRefusedError } from '../transport/door.js';
import { Forwarder, type Sink } from '../transport/forwarder.js';
import { httpDoor } from '../transport/http.js';
import { fetchRunClock, hubOffsetMs } from '../transport/hub-time.js';
import { lineSink } from '../transport/lines.js';
import { socketDoor } from '../transport/socket.js';
import { CommandError, exitCode } from './exit-code.js';
import type { Host } from './host.js';

export interface LineOptions {
  hub: string;
  token?: string;
  door: 'socket' | 'http';
  rate?: number;
  runClock?: boolean;
  stdout?: boolean;
  dryRun?: boolean;
}

export interface Connection {
  sink: Sink;
  /** Null when nothing is sent. */
  forwarder: Forwarder | null;
  clock: WallClock;
  pace: () => Pace;
  close(): void;
}

const CLOCK_AGAIN_MS = 5000;

/** A way out for readings, and the pace at which they go. `startAtMs` is the stamp of the first instant; now when null. */
export async function connect(options: LineOptions, startAtMs: number | null, host: Host): Promise<Connection> {
  const { hub, token, rate = 1 } = options;
  if (options.runClock && options.rate !== undefined) {
    throw new CommandError('With --run-clock the run sets the rate: leave --rate out.', exitCode.usage);
  }
  const isLocal = options.stdout || options.dryRun;
  if (!token && (!isLocal || options.runClock)) {
    throw new CommandError('Give the device token of the probe with --token or in DEVICE_TOKEN.', exitCode.usage);
  }
  if (isLocal && !options.runClock) {
    const clock = options.dryRun ? impatientClock(host.clock.nowMs()) : host.clock;
    const pace = wallPace(clock.nowMs(), rate, startAtMs ?? undefined);
    return { sink: lineSink(host.write), forwarder: null, clock, pace: () => pace, close: () => undefined };
  }

  const clock = shiftedClock(host.clock, await hubOffset(hub, host));
  const follow = options.runClock && token ? await followRunClock(hub, token, clock, host) : null;
  const fixed = wallPace(clock.nowMs(), rate, startAtMs ?? undefined);
  const forwarder =
    isLocal || !token
      ? null
      : new Forwarder({
          door: options.door === 'http' ? httpDoor(hub, token) : socketDoor(hub, token),
          clock: host.clock,
          random: host.random,
          onNotice: host.notice,
        });
  const sink = forwarder ?? lineSink(host.write);
  return {
    sink,
    forwarder,
    clock,
    pace: follow ? follow.pace : () => fixed,
    close() {
      follow?.stop();
      sink.close();
    },
  };
}

async function hubOffset(hub: string, host: Host): Promise<number> {
  try {
    return await hubOffsetMs(hub, host.clock);
  } catch (error) {
    if (!(error instanceof HubAwayError)) throw asCommandError(error);
    host.notice(`${error.message} Going on with the clock here.`);
    return 0;
  }
}

/** Asks again now and then: somebody may change the rate of a rehearsal. */
async function followRunClock(hub: string, token: string, clock: WallClock, host: Host) {
  const first = await fetchRunClock(hub, token).catch((error: unknown) => {
    throw asCommandError(error);
  });
  const startRunMs = runTimeAt(first, clock.nowMs());
  let pace = runClockPace(first, startRunMs);
  const stopped = new AbortController();
  const keepAsking = async () => {
    while (!stopped.signal.aborted) {
      await host.clock.sleep(CLOCK_AGAIN_MS, stopped.signal);
      if (stopped.signal.aborted) return;
      const next = await fetchRunClock(hub, token).catch(() => null);
      if (next) pace = runClockPace(next, startRunMs);
    }
  };
  void keepAsking();
  return { pace: () => pace, stop: () => stopped.abort() };
}

export function asCommandError(error: unknown): unknown {
  if (error instanceof HubRefusedError) return new CommandError(error.message, exitCode.refused);
  if (error instanceof HubAwayError) return new CommandError(error.message, exitCode.undelivered);
  return error;
}
