import { currentStep, standingAlerts, type RunState, type StepProgress } from '@steepfall/shared/runs';
import type { Run } from './models/run.model.js';

export type Projection = Pick<
  Run,
  | 'status'
  | 'outcome'
  | 'endedAtMs'
  | 'currentStepTitle'
  | 'alertStage'
  | 'probeOutAtMs'
  | 'clockAnchorWallMs'
  | 'clockAnchorRunMs'
  | 'clockRate'
  | 'lastSeq'
>;

/** What lists show of a run, from its folded log. */
export function projectionOf(state: RunState): Projection {
  if (!state.clock) throw new Error('A log without a start has no projection.');
  return {
    status: state.status === 'ended' ? 'ended' : 'running',
    outcome: state.outcome,
    endedAtMs: state.endedAtMs,
    currentStepTitle: currentStep(state)?.step.title ?? null,
    alertStage: standingAlerts(state)[0]?.stage ?? null,
    probeOutAtMs: probeOutAtMs(state),
    clockAnchorWallMs: state.clock.anchorWallMs,
    clockAnchorRunMs: state.clock.anchorRunMs,
    clockRate: state.clock.rate,
    lastSeq: state.lastSeq,
  };
}

/** Whether lists look different afterwards. The sequence alone moves with every note and is no news. */
export function isNews(before: Projection, after: Projection): boolean {
  return (Object.keys(after) as (keyof Projection)[]).some((key) => key !== 'lastSeq' && before[key] !== after[key]);
}

/** When the probe came out of the kettle, run clock: with the transfer, or with the last step that has to do with heat. */
export function probeOutAtMs({ steps }: RunState): number | null {
  const transfer = steps.find(({ step }) => step.kind === 'transfer');
  const lastOut = transfer ?? steps.findLast(isAboutHeat);
  return lastOut?.doneAtMs ?? null;
}

function isAboutHeat({ step }: StepProgress): boolean {
  return step.acts.length > 0 || step.start.by === 'temperature' || step.done.by === 'temperature';
}
