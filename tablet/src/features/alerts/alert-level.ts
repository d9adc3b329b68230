import {
  alertPriority,
  isFault,
  type Alert,
  type AlertPriority,
  type AlertStage,
  type RunState,
} from '@steepfall/shared/runs';
import type { AlarmLevel, Ring } from '#lib/audio/alarm-sounds.ts';
import { alertStageId, callingHere } from '#lib/run-store/take-over.ts';
import type { LiveState } from '#lib/run-store/run-store.ts';
import { formatLevel } from '#lib/units.ts';
import { formatDuration, type UnitPreferences } from '@steepfall/shared/units';

const levelOf: Record<AlertStage, AlarmLevel> = {
  'coming-up': 'coming-up',
  'stand-by': 'stand-by',
  now: 'now',
  missed: 'now',
};

/** Faults never have the sound of "now": three tones for what matters soon, two for what can wait. The words tell them from the sheet. */
const faultLevelOf: Record<Exclude<AlertPriority, 'prompt'>, AlarmLevel> = { medium: 'stand-by', low: 'coming-up' };

/** What should sound for this state: the most urgent alert, one at a time. */
export function ringFor(state: RunState): Ring | null {
  const worst = callingHere(state)[0];
  if (!worst) return null;
  const priority = alertPriority(worst);
  const level = isFault(worst) && priority !== 'prompt' ? faultLevelOf[priority] : levelOf[worst.stage];
  return { level, id: alertStageId(worst) };
}

/** When it falls due as known now: the forecast goes on after the alert was raised, a deadline stays. */
export function dueAtMs(alert: Alert, { view }: Pick<LiveState, 'view'>): number | null {
  const isSameLevel = alert.rule === 'temperature' && view?.target?.stepId === alert.stepId;
  const forecast = isSameLevel ? view.forecast : null;
  return forecast?.kind === 'forecast' || forecast?.kind === 'crossed' ? forecast.atMs : alert.dueAtMs;
}

/** How an alert stands to the clock: "in 0:08", "due 3 min ago". */
export function dueText(atMs: number | null, nowMs: number): string | null {
  if (atMs === null) return null;
  const leftS = (atMs - nowMs) / 1000;
  if (leftS > 0.5) return `in ${formatDuration(Math.ceil(leftS))}`;
  const agoS = Math.floor(-leftS);
  if (agoS < 2) return 'due now';
  return agoS < 120 ? `due ${formatDuration(agoS)} ago` : `due ${Math.floor(agoS / 60)} min ago`;
}

/** The level in words without false digits: "62 °C". */
export function alertLevel({ targetC }: Pick<Alert, 'targetC'>, units: UnitPreferences): string | null {
  return targetC === null ? null : formatLevel(targetC, units);
}
