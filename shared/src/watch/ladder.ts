import { courseAt, courseOf, estimateAt, type Course } from './estimate.js';
import { crossingInterval, crossingOf, forecastCrossing, type Crossing } from './forecast.js';
import type { WatchState } from './state.js';
import type { CatchTarget, LadderAlert, LadderStage } from './types.js';

const DEFAULT_COMING_UP_S = 120;
const DEFAULT_STAND_BY_S = 30;
/** Missed: this far past the target and this long after it, or simply so long after it that the moment is gone. */
const MISSED_PAST_C = 1;
const MISSED_AFTER_S = 15;
const MISSED_AT_LATEST_S = 120;
/** Armed when further past the target than this, there is nothing left to catch. */
const FAR_PAST_C = 3;
/** A return counts when the liquid is this far back on the near side, for this long. */
const RETURN_C = 1;
const RETURN_FOR_S = 10;
/** A warning is called off when the crossing has been out of sight this long, or this many times further off than the warning was. */
const OFF_FOR_S = 30;
const OFF_TIMES = 3;
/** A liquid leaving the target faster than this (0.3 K/min) is on its way up to be caught later. */
const LEAVING_C_PER_S = 0.005;
const SLOPE_WAIT_S = 30;
/** After a coil or a top-up the estimate swings until the probe has come after; alerts wait, but not for long. */
const UNSETTLED_C = 0.5;
const UNSETTLED_S = 30;
/** Most that half a step may bring a `now` forward; steps are a reading apart, save in a fast rehearsal. */
const LONGEST_HALF_STEP_S = 2;

export interface LadderState {
  readonly target: CatchTarget;
  /** Highest rung climbed for this crossing. */
  readonly stage: LadderStage | 'armed';
  readonly crossing: number;
  readonly lastStepAtMs: number | null;
  /** When there was an estimate first. */
  readonly seenAtMs: number | null;
  /** The liquid has been on the near side; `way-up` when it was found on the far side and moving away, as in heating up. */
  readonly side: 'unknown' | 'near' | 'way-up';
  /** Since `now`: the liquid has been on the far side. */
  readonly passedAtMs: number | null;
  /** Distance to the target on the near side when `now` was raised, K. */
  readonly nearC: number;
  readonly returnSinceMs: number | null;
  readonly offSinceMs: number | null;
}

/** A ladder for one catch, armed: nothing raised yet. */
export function startLadder(target: CatchTarget): LadderState {
  return {
    target,
    stage: 'armed',
    crossing: 1,
    lastStepAtMs: null,
    seenAtMs: null,
    side: 'unknown',
    passedAtMs: null,
    nearC: 0,
    returnSinceMs: null,
    offSinceMs: null,
  };
}

interface Step {
  nowMs: number;
  tempC: number;
  /** Positive on the near side of the target, K. */
  nearC: number;
  /** Positive towards the target, K/s. */
  towardsCPerS: number;
  rateSdCPerS: number;
  /** The liquid was disturbed a moment ago and could be anywhere within a kelvin or so. */
  isUnsettled: boolean;
  crossing: Crossing | null;
}

/**
 * Climbs the ladder as far as the watch's knowledge at `nowMs` (run clock) says. `now` is raised so that an addition
 * `reachS` later lands on the target. Each stage is raised at most once for each crossing.
 */
export function stepLadder(
  ladder: LadderState,
  watch: WatchState,
  nowMs: number,
): { ladder: LadderState; raised: LadderAlert[] } {
  const course = courseOf(watch);
  const estimate = estimateAt(watch, nowMs);
  const paused = course === null || estimate.status === 'starting' || estimate.status === 'lost';
  if (paused) return { ladder: { ...ladder, lastStepAtMs: nowMs }, raised: [] };
  const step = look(ladder.target, watch, course, nowMs);
  const settled = returned(calledOff(placed(ladder, watch, step), step), step);
  const { stage, alerts } = climb(settled, watch, step);
  const raised = alerts.map((raisedStage) => alertOf(settled, raisedStage, course, step));
  const next = { ...settled, stage, lastStepAtMs: nowMs };
  const isNow = alerts.includes('now') || alerts.includes('missed');
  return { ladder: isNow ? afterNow(next, step) : passing(next, step), raised };
}

function look(target: CatchTarget, watch: WatchState, course: Course, nowMs: number): Step {
  const at = courseAt(course, Math.max(0, (nowMs - course.startMs) / 1000));
  const towards = target.direction === 'rising' ? 1 : -1;
  return {
    nowMs,
    tempC: at.tempC,
    nearC: (target.tempC - at.tempC) * towards,
    towardsCPerS: at.rateCPerS * towards,
    rateSdCPerS: Math.sqrt(Math.max(0, course.belief.rateVariance)),
    isUnsettled: at.sdC > UNSETTLED_C && isWithin(watch.steppedAtMs, nowMs, UNSETTLED_S),
    crossing: crossingOf(course, target),
  };
}

function isWithin(sinceMs: number | null, nowMs: number, spanS: number): boolean {
  return sinceMs !== null && nowMs - sinceMs < spanS * 1000;
}

function alertOf(ladder: LadderState, stage: LadderStage, course: Course, step: Step): LadderAlert {
  const interval = step.crossing && crossingInterval(course, ladder.target, step.crossing);
  return {
    key: ladder.target.key,
    stage,
    crossing: ladder.crossing,
    atMs: step.nowMs,
    tempC: step.tempC,
    crossingAtMs: step.crossing?.atMs ?? null,
    earlyMs: interval?.earlyMs ?? null,
    lateMs: interval?.lateMs ?? null,
  };
}

/** On which side of the target the liquid was met. */
function placed(ladder: LadderState, watch: WatchState, step: Step): LadderState {
  const seenAtMs = ladder.seenAtMs ?? step.nowMs;
  if (step.nearC > 0) return { ...ladder, seenAtMs, side: 'near' };
  if (ladder.side !== 'unknown') return ladder;
  const leaving = ladder.target.direction === 'falling' && watch.kettle.heating;
  const isSure = -step.towardsCPerS > 2 * step.rateSdCPerS && -step.towardsCPerS > LEAVING_C_PER_S;
  return { ...ladder, seenAtMs, side: leaving || isSure ? 'way-up' : 'unknown' };
}

/** A slope of a few readings is a guess: wait this long for it before calling a target on the far side passed. */
function isUnsure(ladder: LadderState, step: Step): boolean {
  const waitedS = (step.nowMs - (ladder.seenAtMs ?? step.nowMs)) / 1000;
  return waitedS < SLOPE_WAIT_S && step.rateSdCPerS > LEAVING_C_PER_S && step.towardsCPerS < 2 * step.rateSdCPerS;
}

function climb(
  ladder: LadderState,
  watch: WatchState,
  step: Step,
): { stage: LadderState['stage']; alerts: LadderStage[] } {
  const { stage, target, side } = ladder;
  const kept = { stage, alerts: [] };
  if (stage === 'missed') return kept;
  if (step.isUnsettled && stage !== 'now') return kept;
  if (stage === 'now') return isMissed(ladder, step) ? { stage: 'missed', alerts: ['missed'] } : kept;
  if (step.nearC <= 0) {
    if (side === 'way-up') return kept;
    if (side === 'near') return { stage: 'now', alerts: stage === 'armed' ? ['stand-by', 'now'] : ['now'] };
    if (isUnsure(ladder, step)) return kept;
    const found: LadderStage = -step.nearC > FAR_PAST_C ? 'missed' : 'now';
    return { stage: found, alerts: [found] };
  }
  if (step.crossing === null) return kept;
  const leftS = (step.crossing.atMs - step.nowMs) / 1000 - target.reachS;
  if (leftS <= halfStepS(ladder, step.nowMs)) {
    return { stage: 'now', alerts: stage === 'armed' ? ['stand-by', 'now'] : ['now'] };
  }
  if (stage === 'stand-by') return kept;
  if (leftS <= (target.standByS ?? DEFAULT_STAND_BY_S)) return { stage: 'stand-by', alerts: ['stand-by'] };
  if (stage === 'coming-up') return kept;
  const comingUpS = target.comingUpS ?? DEFAULT_COMING_UP_S;
  const isDue = leftS <= comingUpS && isClear(watch, target, step, comingUpS);
  return isDue ? { stage: 'coming-up', alerts: ['coming-up'] } : kept;
}

/** A first warning needs a forecast worth the name, or one whose late end is still soon. */
function isClear(watch: WatchState, target: CatchTarget, step: Step, comingUpS: number): boolean {
  if (forecastCrossing(watch, target, step.nowMs).kind === 'forecast') return true;
  const course = courseOf(watch);
  if (course === null || step.crossing === null) return false;
  const { lateMs } = crossingInterval(course, target, step.crossing);
  return (lateMs - step.nowMs) / 1000 - target.reachS <= comingUpS;
}

/** Of two steps the nearer one to the instant is the right one. */
function halfStepS(ladder: LadderState, nowMs: number): number {
  if (ladder.lastStepAtMs === null) return 0;
  return Math.min(LONGEST_HALF_STEP_S, (nowMs - ladder.lastStepAtMs) / 2000);
}

function isMissed({ passedAtMs }: LadderState, { nowMs, nearC }: Step): boolean {
  if (passedAtMs === null) return false;
  const sinceS = (nowMs - passedAtMs) / 1000;
  return sinceS >= MISSED_AT_LATEST_S || (sinceS >= MISSED_AFTER_S && -nearC >= MISSED_PAST_C);
}

function afterNow(ladder: LadderState, step: Step): LadderState {
  return {
    ...ladder,
    nearC: Math.max(0, step.nearC),
    passedAtMs: step.nearC <= 0 ? step.nowMs : ladder.passedAtMs,
    returnSinceMs: null,
    offSinceMs: null,
  };
}

function passing(ladder: LadderState, step: Step): LadderState {
  const over = ladder.stage === 'now' && ladder.passedAtMs === null && step.nearC <= 0;
  return over ? { ...ladder, passedAtMs: step.nowMs } : ladder;
}

function rearmed(ladder: LadderState): LadderState {
  const { target, crossing, lastStepAtMs, seenAtMs } = ladder;
  return { ...startLadder(target), crossing: crossing + 1, lastStepAtMs, seenAtMs, side: 'near' };
}

/** After `now`: armed again once the liquid is truly back on the near side. */
function returned(ladder: LadderState, step: Step): LadderState {
  if (ladder.stage !== 'now' && ladder.stage !== 'missed') return ladder;
  const backC = ladder.passedAtMs === null ? ladder.nearC + RETURN_C : RETURN_C;
  const isBack = step.nearC >= backC && step.towardsCPerS <= 0.002;
  if (!isBack) return ladder.returnSinceMs === null ? ladder : { ...ladder, returnSinceMs: null };
  const since = ladder.returnSinceMs ?? step.nowMs;
  if (step.nowMs - since >= RETURN_FOR_S * 1000) return rearmed(ladder);
  return { ...ladder, returnSinceMs: since };
}

/** After a warning: armed again when the crossing has moved well out of sight. */
function calledOff(ladder: LadderState, step: Step): LadderState {
  if (ladder.stage !== 'coming-up' && ladder.stage !== 'stand-by') return ladder;
  const { reachS, comingUpS = DEFAULT_COMING_UP_S } = ladder.target;
  const leftS = step.crossing ? (step.crossing.atMs - step.nowMs) / 1000 - reachS : Infinity;
  const isOff = step.nearC > 0.5 && leftS > OFF_TIMES * comingUpS;
  if (!isOff) return ladder.offSinceMs === null ? ladder : { ...ladder, offSinceMs: null };
  const since = ladder.offSinceMs ?? step.nowMs;
  if (step.nowMs - since >= OFF_FOR_S * 1000) return rearmed(ladder);
  return { ...ladder, offSinceMs: since };
}
