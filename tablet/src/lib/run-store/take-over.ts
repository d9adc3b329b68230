import { standingAlerts, type Alert, type RunCommand, type RunState } from '@steepfall/shared/runs';

/** The alert that takes the screen: the most urgent one that says "now" or later. Lower stages stay at the edge. */
export function takeOverAlert(state: RunState): Alert | null {
  const worst = standingAlerts(state)[0];
  return worst && (worst.stage === 'now' || worst.stage === 'missed') ? worst : null;
}

/** "Heard it", in commands: a timer somebody set for themselves is over with it. */
export function heardCommands({ key, crossing, rule, stepId }: Alert): RunCommand[] {
  const heard: RunCommand = { type: 'acknowledgeAlert', key, crossing };
  if (rule !== 'timer' || stepId !== null) return [heard];
  return [heard, { type: 'stopTimer', timerId: key.replace('timer:', '') }];
}

/** Names one stage of one alert, for keys and for the ringer. */
export function alertStageId({ key, crossing, stage }: Alert): string {
  return `${key}/${crossing}/${stage}`;
}
