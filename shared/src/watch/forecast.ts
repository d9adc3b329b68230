import { courseAt, courseOf, type Course } from './estimate.js';
import type { WatchState } from './state.js';
import type { CrossingForecast, CrossingTarget, ForecastPoint } from './types.js';

/** 90 % of a normal distribution lies within this many standard deviations. */
const Z_90 = 1.6449;
/** Beyond this nothing is forecast. */
const LONGEST_HORIZON_S = 6 * 3600;
/** A wider interval than this share of the horizon says too little, unless it is narrow in kelvin. */
const WIDEST_SHARE = 0.5;
const NARROW_C = 1;
/** Moving away from the target faster than this (0.3 K/min) is leaving it. */
const LEAVING_C_PER_S = 0.005;
/** Good readings before any forecast. */
const GOOD_TO_FORECAST = 8;

/** The crossing as the course has it, however unsure; it may lie in the past. */
export interface Crossing {
  /** Seconds from the start of the course. */
  aheadS: number;
  atMs: number;
  rateCPerS: number;
}

function sign(target: CrossingTarget): number {
  return target.direction === 'rising' ? 1 : -1;
}

/** Seconds from the start of the course to the target; negative when it lies behind; null when it is never reached. */
function secondsTo(course: Course, tempC: number): number | null {
  const { rateCPerS: s, decayPerS: k } = course;
  if (s === 0) return null;
  const straight = (tempC - course.tempC) / s;
  const inside = 1 - k * straight;
  if (inside <= 0) return null;
  return k < 1e-9 ? straight : -Math.log(inside) / k;
}

/** First instant in [from, to] at which `isPast` holds, given that it is false before and true after. */
function bisect(from: number, to: number, isPast: (aheadS: number) => boolean): number {
  let low = from;
  let high = to;
  for (let i = 0; i < 24; i += 1) {
    const middle = (low + high) / 2;
    if (isPast(middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** null when the target is never reached. */
export function crossingOf(course: Course, target: CrossingTarget): Crossing | null {
  if (course.rateCPerS * sign(target) <= 0) return null;
  const aheadS = secondsTo(course, target.tempC);
  if (aheadS === null || aheadS > LONGEST_HORIZON_S) return null;
  const { rateCPerS } = courseAt(course, aheadS);
  return { aheadS, atMs: msOf(course, aheadS), rateCPerS };
}

function msOf(course: Course, aheadS: number): number {
  return Math.round(course.startMs + aheadS * 1000);
}

/** The 90 % interval of a crossing: where the edges of the wedge cross the target. */
export function crossingInterval(
  course: Course,
  target: CrossingTarget,
  { aheadS }: Crossing,
): { earlyMs: number; lateMs: number } {
  const towards = sign(target);
  const past = (at: number, z: number) => {
    const { tempC, sdC } = courseAt(course, at);
    return (tempC - target.tempC) * towards + z * sdC >= 0;
  };
  const near = courseAt(course, aheadS);
  const slackS = (4 * near.sdC) / Math.max(1e-5, Math.abs(near.rateCPerS));
  const earlyS = bisect(aheadS - slackS, aheadS, (at) => past(at, Z_90));
  const lateS = bisect(aheadS, aheadS + 4 * slackS + 1, (at) => past(at, -Z_90));
  return { earlyMs: msOf(course, earlyS), lateMs: msOf(course, lateS) };
}

/** When the trail last went through the target in its direction; the start of the trail when it was past it all along. */
function crossedAt(state: WatchState, target: CrossingTarget, nowMs: number): number | null {
  const towards = sign(target);
  const { trail } = state;
  for (let i = trail.length - 1; i > 0; i -= 1) {
    const before = (trail[i - 1]!.tempC - target.tempC) * towards;
    const after = (trail[i]!.tempC - target.tempC) * towards;
    if (before < 0 && after >= 0) {
      const share = -before / (after - before);
      return Math.min(nowMs, Math.round(trail[i - 1]!.atMs + share * (trail[i]!.atMs - trail[i - 1]!.atMs)));
    }
  }
  const first = trail[0];
  if (first && (first.tempC - target.tempC) * towards >= 0) return first.atMs;
  return null;
}

/** When the liquid goes through `target`, with a 90 % interval, seen from `nowMs` (run clock). */
export function forecastCrossing(state: WatchState, target: CrossingTarget, nowMs: number): CrossingForecast {
  const course = courseOf(state);
  if (course === null || state.verdictCounts.good < GOOD_TO_FORECAST) return { kind: 'too-early' };
  const towards = sign(target);
  const now = courseAt(course, Math.max(0, (nowMs - course.startMs) / 1000));
  if ((now.tempC - target.tempC) * towards >= 0) {
    const wasNear = state.trail.some(({ tempC }) => (tempC - target.tempC) * towards < 0);
    // A pot heated up to be caught on the way down has not crossed anything yet.
    if (!wasNear && now.rateCPerS * towards < -LEAVING_C_PER_S) return { kind: 'never' };
    const atMs = crossedAt(state, target, nowMs) ?? crossingOf(course, target)?.atMs ?? nowMs;
    return { kind: 'crossed', atMs: Math.min(nowMs, atMs) };
  }
  const crossing = crossingOf(course, target);
  if (crossing === null) {
    const doubt = Math.sqrt(Math.max(0, course.belief.rateVariance));
    return course.rateCPerS * towards + 2 * doubt > 0 && doubt > 0.005 ? { kind: 'too-early' } : { kind: 'never' };
  }
  const { atMs, rateCPerS } = crossing;
  const { earlyMs, lateMs } = crossingInterval(course, target, crossing);
  const widthS = (lateMs - earlyMs) / 1000;
  const horizonS = Math.max(0, (atMs - nowMs) / 1000);
  if (widthS > WIDEST_SHARE * horizonS && widthS * Math.abs(rateCPerS) > NARROW_C) return { kind: 'too-early' };
  return { kind: 'forecast', atMs: Math.max(nowMs, atMs), earlyMs: Math.max(nowMs, earlyMs), lateMs };
}

/** The course from `nowMs` on, for drawing: a line and a 90 % wedge that widens. Empty before there is an estimate. */
export function forecastCurve(state: WatchState, nowMs: number, horizonS: number, stepS: number): ForecastPoint[] {
  const course = courseOf(state);
  if (course === null || !(stepS > 0)) return [];
  const points: ForecastPoint[] = [];
  for (let ahead = 0; ahead <= horizonS; ahead += stepS) {
    const atMs = Math.round(nowMs + ahead * 1000);
    const { tempC, sdC } = courseAt(course, Math.max(0, (atMs - course.startMs) / 1000));
    points.push({ atMs, tempC, lowC: tempC - Z_90 * sdC, highC: tempC + Z_90 * sdC });
  }
  return points;
}
