import { burstsOf, callingAlerts, isFault, type Alert, type RunCommand, type RunState } from '@steepfall/shared/runs';
import { stationName } from '../ids.ts';
import { ValueStore } from '../value-store.ts';

/** What calls on this tablet. A fault that was put aside is raised anew at its end, so no clock is asked here. */
export function callingHere(state: RunState): Alert[] {
  return callingAlerts(state, 0, stationName());
}

/**
 * The alert that takes the screen: what the sheet calls for with "now" or later, or else a silent probe while a level is waited for. Lower
 * stages and other faults stay at the edge. Of faults that came together the first is shown: the others are likely to follow from it.
 */
export function takeOverAlert(state: RunState): Alert | null {
  const calling = callingHere(state);
  const prompt = calling.find((alert) => !isFault(alert) && (alert.stage === 'now' || alert.stage === 'missed'));
  if (prompt) return prompt;
  const burst = burstsOf(calling.filter(isFault)).find(({ first, rest }) =>
    [first, ...rest].some(({ rule }) => rule === 'signal'),
  );
  return burst?.first ?? null;
}

/** What a pedal or a wave does while the screen is taken, where that is more than "heard it". */
export const takeOverPress = new ValueStore<(() => void) | null>(null);

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
