import { standingAlerts, type Alert, type AlertStage, type RunState } from '@steepfall/shared/runs';
import type { AlarmLevel, Ring } from '#lib/audio/alarm-sounds.ts';
import { alertStageId } from '#lib/run-store/take-over.ts';
import { formatDuration } from '@steepfall/shared/units';

const levelOf: Record<AlertStage, AlarmLevel> = {
  'coming-up': 'coming-up',
  'stand-by': 'stand-by',
  now: 'now',
  missed: 'now',
};

/** What should sound for this state: the most urgent alert, one at a time. */
export function ringFor(state: RunState): Ring | null {
  const worst = standingAlerts(state)[0];
  return worst ? { level: levelOf[worst.stage], id: alertStageId(worst) } : null;
}

/** How the alert stands to the clock: "in 0:08", "due 3 min ago". */
export function dueText({ dueAtMs }: Pick<Alert, 'dueAtMs'>, nowMs: number): string | null {
  if (dueAtMs === null) return null;
  const leftS = (dueAtMs - nowMs) / 1000;
  if (leftS > 0.5) return `in ${formatDuration(Math.ceil(leftS))}`;
  const agoS = Math.floor(-leftS);
  if (agoS < 2) return 'due now';
  return agoS < 120 ? `due ${formatDuration(agoS)} ago` : `due ${Math.floor(agoS / 60)} min ago`;
}
