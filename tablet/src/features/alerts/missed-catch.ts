import {
  missedChoices,
  type Alert,
  type MissedCatch,
  type MissedChoice,
  type RunState,
  type StepProgress,
} from '@steepfall/shared/runs';
import type { LiveState, RunSnapshot } from '#lib/run-store/run-store.ts';

/** Where nobody said how warm the kitchen or its water is, °C. */
const USUAL_ROOM_C = 20;
const USUAL_COOLANT_C = 15;
/** What nothing takes out stays in until the transfer, °C. */
const USUAL_OUT_C = 20;

export interface Missed {
  alert: Alert;
  progress: StepProgress;
}

function levelOf({ step }: StepProgress): number | null {
  const level = [step.start, step.done].find(
    (condition) => condition.by === 'temperature' && condition.direction === 'falling',
  );
  return level?.by === 'temperature' ? level.tempC : null;
}

/** What ends the contact: the next step that takes something out, by its level, or by the time that stands before it. */
function outOf(state: RunState, { progress }: Missed): MissedCatch['out'] {
  const after = state.steps.slice(state.steps.indexOf(progress) + 1);
  const outIndex = after.findIndex(({ step }) => step.kind === 'remove');
  const out = after[outIndex < 0 ? after.findIndex(({ step }) => step.kind === 'transfer') : outIndex];
  const before = after[outIndex - 1]?.step.done;
  if (before?.by === 'timer') return { standS: before.durationS };
  if (before?.by === 'temperature' && before.direction === 'falling') return { tempC: before.tempC };
  return { tempC: (out && levelOf(out)) ?? USUAL_OUT_C };
}

function isChilling({ steps }: RunState): boolean {
  const acts = steps.filter(({ status }) => status === 'done').flatMap(({ step }) => step.acts);
  return acts.findLast((act) => act === 'chiller-on' || act === 'chiller-off') === 'chiller-on';
}

/** The liquid of this instant; `null` when nobody knows it. */
export function liquidC({ view }: Pick<LiveState, 'view'>): number | null {
  return view?.estimate.status === 'live' ? view.estimate.tempC : null;
}

/**
 * The ways out of a missed catch with their figures, as the watch sees the liquid now. Without a reading there are no figures: then it goes
 * in and is taken as it is.
 */
export function choicesNow(
  missed: Missed,
  { state, summary }: Pick<RunSnapshot, 'state' | 'summary'>,
  live: Pick<LiveState, 'view'>,
): { nowC: number | null; choices: MissedChoice[] } {
  const nowC = liquidC(live);
  const { alert, progress } = missed;
  const kettle = state.kit?.kettle ?? null;
  const roomC = summary?.roomC ?? USUAL_ROOM_C;
  const coolantC = state.kit?.chiller?.coolantC ?? summary?.coolantC ?? USUAL_COOLANT_C;
  if (nowC === null || alert.targetC === null || nowC < 0 || nowC > 130) {
    const accept = { choice: 'accept', holdS: null, extraG: null, reheatS: null, aromaRatio: 1, isoRatio: 1 } as const;
    return { nowC: null, choices: [accept] };
  }
  const choices = missedChoices({
    targetC: alert.targetC,
    nowC,
    out: outOf(state, missed),
    massG: progress.step.amounts.reduce((sum, { massG }) => sum + massG, 0),
    surroundC: isChilling(state) ? coolantC : roomC,
    rateCPerMin: live.view?.estimate.rateCPerMin ?? null,
    heat: kettle && state.document ? { waterL: state.document.waterL, roomC, kettle } : null,
  });
  return { nowC, choices };
}

/** The steps from the current one to this one; empty when it is not ahead. */
export function stepsUpTo(state: RunState, stepId: string | null): StepProgress[] {
  const open = state.steps.filter(({ status }) => status !== 'done');
  return open.slice(0, open.findIndex(({ step }) => step.id === stepId) + 1);
}
