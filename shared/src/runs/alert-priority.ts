import type { Alert } from './state.js';

/** `prompt`: the sheet calls at its time, which is no fault. The others are faults, by what is lost when nobody acts. */
export type AlertPriority = 'prompt' | 'medium' | 'low';

/** A fault is quiet for this long without a word why, s. */
export const QUIET_S = 120;
export const QUIET_REASON = 'quiet for 2 min';
/** s. */
export const USUAL_SHELF_S = 600;
export const LONGEST_SHELF_S = 3600;

/**
 * How much an alert matters. A missed catch and a probe, hub or tablet that went silent put the quality of the batch at risk within minutes; a
 * battery can wait a little.
 *
 * @see priorities by consequence and time, after ISA-18.2 and EEMUA 191.
 */
export function alertPriority({ rule, stage }: Pick<Alert, 'rule' | 'stage'>): AlertPriority {
  if (rule === 'temperature' || rule === 'timer') return stage === 'missed' ? 'medium' : 'prompt';
  return rule === 'battery' ? 'low' : 'medium';
}

/** Of what helps to watch. The rest is what the sheet calls for, which is no fault, and never in one list with them. */
export function isFault({ rule }: Pick<Alert, 'rule'>): boolean {
  return rule !== 'temperature' && rule !== 'timer';
}

/** What the sheet calls for is done or heard, never put aside; a fault of the kit can wait with a reason. */
export function canShelve(alert: Pick<Alert, 'rule'>): boolean {
  return isFault(alert);
}

/** Put aside at this moment of the run. */
export function isShelved({ shelvedUntilMs }: Pick<Alert, 'shelvedUntilMs'>, nowMs: number): boolean {
  return shelvedUntilMs !== null && nowMs < shelvedUntilMs;
}

/** More than this many in ten minutes is a flood: people stop listening (EEMUA 191). */
const FLOOD_ABOVE = 10;
const FLOOD_MS = 600_000;

/** Whether any ten minutes of these instants hold a flood. @param atMs in any order. */
export function isFlood(atMs: readonly number[]): boolean {
  const sorted = [...atMs].sort((a, b) => a - b);
  return sorted.some((from, index) => {
    const last = sorted[index + FLOOD_ABOVE];
    return last !== undefined && last - from <= FLOOD_MS;
  });
}

/** Three times or more within a minute, both ends counted (ISA-18.2). @param atMs in any order. */
export function isChattering(atMs: readonly number[]): boolean {
  const sorted = [...atMs].sort((a, b) => a - b);
  return sorted.some((from, index) => (sorted[index + 2] ?? Infinity) - from <= 60_000);
}
