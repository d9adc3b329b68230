import type { PushMessage } from '@steepfall/shared/contracts';
import { alertWords, isShelved, stageRank, type Alert, type RunState } from '@steepfall/shared/runs';
import { runTimeAt, wallTimeAt, type RunClock } from '@steepfall/shared/timers';
import { formatMass, type UnitPreferences } from '@steepfall/shared/units';
import { PUSH_LIFE_S } from './push-sender.js';

const LATE_IS_NEWS_MS = 600_000;

/** Names an alert through all its stages. */
export function alertTag({ key, crossing }: Pick<Alert, 'key' | 'crossing'>): string {
  return `${key}/${crossing}`;
}

/**
 * The alerts that reached a new stage between two states and are worth a buzz in a pocket: from "stand by" on, still standing, and of
 * this minute. One that was found out late, as after a power cut, is left to the screens, which say how late it is.
 */
export function newsForPhones(before: RunState, after: RunState, wallMs: number): Alert[] {
  const { clock } = after;
  if (clock === null || after.status !== 'running') return [];
  return after.alerts.filter((alert) => {
    if (!alert.isStanding || alert.stage === 'coming-up' || isShelved(alert, runTimeAt(clock, wallMs))) return false;
    const known = before.alerts.find(({ key, crossing }) => key === alert.key && crossing === alert.crossing);
    if (known && stageRank(known.stage) >= stageRank(alert.stage)) return false;
    return !isLate(alert, clock, wallMs);
  });
}

function isLate({ stage, dueAtMs, raisedAtMs }: Alert, clock: RunClock, wallMs: number): boolean {
  const agoMs = (atMs: number) => wallMs - wallTimeAt(clock, atMs);
  if (agoMs(raisedAtMs) > PUSH_LIFE_S * 1000) return true;
  // "Late" itself says that its moment is over; slow cooling makes it known minutes after.
  return dueAtMs !== null && agoMs(dueAtMs) > (stage === 'missed' ? LATE_IS_NEWS_MS : PUSH_LIFE_S * 1000);
}

/** The alert in words that fit on a lock screen. */
export function pushMessageOf(state: RunState, alert: Alert, units: UnitPreferences, sentAtMs: number): PushMessage {
  const { sentence, amounts } = alertWords(state, alert, units.temperature);
  const bags = amounts.map(
    ({ name, massG, bag }) => `${formatMass(massG, { unit: units.mass })} ${name}${bag ? `, ${bag}` : ''}`,
  );
  const body = [...bags, state.title].join(' · ');
  return { tag: alertTag(alert), stage: alert.stage, title: sentence, body, sentAtMs };
}
