import { alertWords, isShelved, type Alert, type AlertPriority, type RunState } from '@steepfall/shared/runs';
import { clockTime } from '#lib/words.ts';

/** Of what does not work, by how soon it matters; what the sheet calls for has words of its own. */
export const faultWords: Record<AlertPriority, string> = { prompt: 'Alert', medium: 'Fault', low: 'Fault, can wait' };

/** What is known of a fault that is still true: who is to act, or until when it is put aside. */
export function faultStanding(alert: Alert, nowMs: number): string {
  if (isShelved(alert, nowMs) && alert.shelvedUntilMs !== null)
    return `put aside until ${clockTime(alert.shelvedUntilMs)}: ${alert.shelvedReason ?? ''}`;
  return alert.acknowledgedAtMs === null
    ? `calls since ${clockTime(alert.raisedAtMs)}`
    : `heard at ${clockTime(alert.acknowledgedAtMs)}, calls again after 5 min`;
}

/** "2 faults, 1 put aside" */
export function faultCount(faults: readonly Alert[], nowMs: number): string {
  const aside = faults.filter((alert) => isShelved(alert, nowMs)).length;
  const all = faults.length === 1 ? '1 fault' : `${faults.length} faults`;
  return aside === 0 ? all : `${all}, ${aside} put aside`;
}

/** One line for faults that make no noise any more: what was heard never leaves the screen. */
export function quietText(faults: readonly Alert[], state: RunState, nowMs: number): string {
  const [only] = faults;
  if (!only || faults.length > 1) return faultCount(faults, nowMs);
  return `${alertWords(state, only).verb}: ${faultStanding(only, nowMs)}`;
}
