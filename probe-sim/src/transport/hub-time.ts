import { healthSchema } from '@steepfall/shared/contracts';
import { runClockSchema, type RunClock } from '@steepfall/shared/timers';
import type { WallClock } from '../clock/index.js';
import { ask, bearer, understood } from './http.js';

/** The quickest of a few answers tells the time best. */
const QUESTIONS = 3;

/**
 * What to add to the wall clock here to get the hub's, ms: right within half of the way there and back.
 *
 * @throws HubAwayError when nobody answers.
 */
export async function hubOffsetMs(hub: string, clock: WallClock): Promise<number> {
  let best = { offsetMs: 0, tookMs: Number.POSITIVE_INFINITY };
  for (let i = 0; i < QUESTIONS; i += 1) {
    const askedMs = clock.nowMs();
    const { nowMs } = understood(healthSchema, await ask(`${hub}/api/health`), hub);
    const tookMs = clock.nowMs() - askedMs;
    if (tookMs < best.tookMs) best = { offsetMs: nowMs - (askedMs + tookMs / 2), tookMs };
  }
  return Math.round(best.offsetMs);
}

/** The clock of the run that this device is attached to. */
export async function fetchRunClock(hub: string, deviceToken: string): Promise<RunClock> {
  const answer = await ask(`${hub}/api/device/clock`, { headers: bearer(deviceToken) });
  return understood(runClockSchema.loose(), answer, hub);
}
