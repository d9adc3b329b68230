import type { PushedReadings } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';

/** Clocks of devices are not better than this. */
const FUTURE_SLACK_MS = 60_000;
const OLDEST_MS = 30 * 24 * 3_600_000;
/** No liquid and no driver code is beyond this; codes such as -127 and 85.0 are kept for the watch to judge. */
const WIDEST_C = 1000;

export interface Judged {
  accepted: Reading[];
  refused: PushedReadings['refused'];
}

/** Which readings are kept, by the clock they are stamped with. Order does not matter: late ones are welcome. */
export function judgeReadings(readings: readonly Reading[], nowMs: number): Judged {
  const judged: Judged = { accepted: [], refused: [] };
  readings.forEach((reading, index) => {
    const reason = reasonAgainst(reading, nowMs);
    if (reason) judged.refused.push({ index, reason });
    else judged.accepted.push(reading);
  });
  return judged;
}

function reasonAgainst({ atMs, tempC }: Reading, nowMs: number): PushedReadings['refused'][number]['reason'] | null {
  if (atMs > nowMs + FUTURE_SLACK_MS) return 'in-the-future';
  if (atMs < nowMs - OLDEST_MS) return 'too-old';
  if (tempC !== null && Math.abs(tempC) > WIDEST_C) return 'out-of-range';
  return null;
}
