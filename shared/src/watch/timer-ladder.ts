import type { LadderAlert, LadderStage, TimerTarget } from './types.js';

const DEFAULT_COMING_UP_S = 120;
const DEFAULT_STAND_BY_S = 30;
/** A timer's end counts as missed when nobody has acted this long after it. */
const MISSED_AFTER_S = 15;

const ORDER: readonly LadderStage[] = ['coming-up', 'stand-by', 'now', 'missed'];

export interface TimerLadderState {
  readonly target: TimerTarget;
  readonly stage: LadderStage | 'armed';
}

/** A ladder for one timer, armed: nothing raised yet. */
export function startTimerLadder(target: TimerTarget): TimerLadderState {
  return { target, stage: 'armed' };
}

/** Climbs to the stage that `nowMs` (run clock) calls for; of several that fell due since the last step only the highest is raised. */
export function stepTimerLadder(
  ladder: TimerLadderState,
  nowMs: number,
): { ladder: TimerLadderState; raised: LadderAlert[] } {
  const due = dueStage(ladder.target, nowMs);
  if (due === null || (ladder.stage !== 'armed' && ORDER.indexOf(due) <= ORDER.indexOf(ladder.stage))) {
    return { ladder, raised: [] };
  }
  const { key, endsAtMs } = ladder.target;
  const alert: LadderAlert = {
    key,
    stage: due,
    crossing: 1,
    atMs: nowMs,
    tempC: null,
    crossingAtMs: endsAtMs,
    earlyMs: endsAtMs,
    lateMs: endsAtMs,
  };
  return { ladder: { ...ladder, stage: due }, raised: [alert] };
}

function dueStage(target: TimerTarget, nowMs: number): LadderStage | null {
  const { endsAtMs, reachS, comingUpS = DEFAULT_COMING_UP_S, standByS = DEFAULT_STAND_BY_S } = target;
  const nowAtMs = endsAtMs - reachS * 1000;
  if (nowMs >= endsAtMs + MISSED_AFTER_S * 1000) return 'missed';
  if (nowMs >= nowAtMs) return 'now';
  if (nowMs >= nowAtMs - standByS * 1000) return 'stand-by';
  if (nowMs >= nowAtMs - comingUpS * 1000) return 'coming-up';
  return null;
}
