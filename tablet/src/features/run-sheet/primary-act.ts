import { currentStep, type RunState, type StepProgress } from '@steepfall/shared/runs';
import type { MeasuredQuantity } from '@steepfall/shared/sheets';
import { takeOverAlert } from '#lib/run-store/take-over.ts';

/** What the big button does at this point of the run. */
export type PrimaryAct =
  | { kind: 'complete'; progress: StepProgress }
  /** The step asks for a number first; it can be done without one. */
  | { kind: 'measure'; progress: StepProgress; quantity: MeasuredQuantity }
  | { kind: 'finish' }
  | { kind: 'none' };

export function primaryAct(state: RunState): PrimaryAct {
  if (state.status !== 'running') return { kind: 'none' };
  const progress = currentStep(state);
  if (!progress) return { kind: 'finish' };
  const quantity = progress.step.done.by === 'measurement' ? progress.step.done.quantity : progress.step.asks;
  const startedAtMs = progress.startedAtMs ?? 0;
  const isMeasured = state.measurements.some((one) => one.quantity === quantity && one.atMs >= startedAtMs);
  if (quantity && !isMeasured) return { kind: 'measure', progress, quantity };
  return { kind: 'complete', progress };
}

/** What a pedal's "next" does: an alert comes first, so that one press in a hurry stops the noise and nothing else. */
export type PedalNext = { kind: 'acknowledge'; key: string; crossing: number } | PrimaryAct;

export function pedalNext(state: RunState): PedalNext {
  const alert = takeOverAlert(state);
  if (alert) return { kind: 'acknowledge', key: alert.key, crossing: alert.crossing };
  return primaryAct(state);
}
