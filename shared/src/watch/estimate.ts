import { believe, type Belief } from './bank.js';
import { slopeLaw } from './slope-law.js';
import type { WatchState } from './state.js';
import type { WatchEstimate, WatchMode, WatchStatus } from './types.js';
import { surroundings } from './watch.js';

/** Least age at which a reading is stale, and how many times that it takes to be lost. */
const LEAST_STALE_S = 30;
const LOST_AFTER_STALES = 10;
/** Readings after which the slope means something. */
const GOOD_TO_BE_LIVE = 8;
/** A slope below this is no slope, in K/s (0.1 K/min). */
const HOLDING_C_PER_S = 0.1 / 60;
/** Relative error of how the slope bends: the surroundings are roughly known, the exponent of an open pot is not. */
const BEND_ERROR = 0.5;
const CHILL_BEND_ERROR = 0.1;
/** Relative change of flow or draught to expect, per square root of a second ahead. */
const DRIFT_PER_ROOT_S = 0.002;

/** The belief as a curve: where the liquid goes if nothing is done, and how sure that is. */
export interface Course {
  readonly startMs: number;
  readonly tempC: number;
  readonly rateCPerS: number;
  readonly decayPerS: number;
  readonly grows: boolean;
  readonly belief: Belief;
}

export function courseOf(state: WatchState): Course | null {
  if (state.bank === null) return null;
  const belief = believe(state.bank);
  const law = slopeLaw(belief.tempC, belief.rateCPerS, surroundings(state));
  return {
    startMs: state.bankAtMs,
    tempC: belief.tempC,
    rateCPerS: belief.rateCPerS,
    decayPerS: law.decayPerS,
    grows: law.decayGrows > 0,
    belief,
  };
}

/** Where the course is `aheadS` after its start. */
export function courseAt(course: Course, aheadS: number): { tempC: number; rateCPerS: number; sdC: number } {
  const { decayPerS: k, rateCPerS: s, belief } = course;
  const left = Math.exp(-k * aheadS);
  const run = k * Math.abs(aheadS) < 1e-9 ? aheadS : (1 - left) / k;
  // When the decay itself is proportional to the slope a steeper start flattens sooner.
  const lever = course.grows ? aheadS * left : run;
  const bendError = course.grows && k > 6e-4 ? CHILL_BEND_ERROR : BEND_ERROR;
  const bend = 0.5 * s * aheadS * aheadS * k * bendError;
  const drift = (DRIFT_PER_ROOT_S * s) ** 2 * Math.abs(aheadS) ** 3 * (1 / 3);
  const variance =
    belief.tempVariance + 2 * lever * belief.crossVariance + lever * lever * belief.rateVariance + bend * bend + drift;
  return { tempC: course.tempC + run * s, rateCPerS: s * left, sdC: Math.sqrt(Math.max(1e-6, variance)) };
}

function statusAt(state: WatchState, atMs: number): WatchStatus {
  if (state.bank === null || state.lastGoodAtMs === null) {
    const waitingS = state.lastGoodAtMs === null ? 0 : (atMs - state.lastGoodAtMs) / 1000;
    return waitingS > staleAfterS(state) * LOST_AFTER_STALES ? 'lost' : 'starting';
  }
  const ageS = (atMs - state.lastGoodAtMs) / 1000;
  const staleS = staleAfterS(state);
  if (ageS > staleS * LOST_AFTER_STALES) return 'lost';
  if (ageS > staleS) return 'stale';
  return state.verdictCounts.good < GOOD_TO_BE_LIVE ? 'starting' : 'live';
}

/** Age in seconds at which the newest good reading no longer counts as now. */
export function staleAfterS(state: WatchState): number {
  return Math.max(3 * state.config.samplePeriodS, LEAST_STALE_S);
}

function modeOf(rateCPerS: number, sdCPerS: number): WatchMode {
  if (Math.abs(rateCPerS) < Math.max(HOLDING_C_PER_S, 1.5 * sdCPerS)) return 'holding';
  return rateCPerS > 0 ? 'climbing' : 'falling';
}

/**
 * The liquid's own temperature and slope at `atMs`, carried on from the newest good reading; its spread grows with the age
 * of that reading.
 */
export function estimateAt(state: WatchState, atMs: number): WatchEstimate {
  const status = statusAt(state, atMs);
  const { lastGoodAtMs } = state;
  const course = courseOf(state);
  if (course === null) return { status, tempC: null, sdC: null, rateCPerMin: null, mode: 'holding', lastGoodAtMs };
  if (status === 'lost') return { status, tempC: null, sdC: null, rateCPerMin: null, mode: 'holding', lastGoodAtMs };
  const at = courseAt(course, Math.max(0, (atMs - course.startMs) / 1000));
  return {
    status,
    tempC: at.tempC,
    sdC: at.sdC,
    rateCPerMin: at.rateCPerS * 60,
    mode: modeOf(at.rateCPerS, Math.sqrt(Math.max(0, course.belief.rateVariance))),
    lastGoodAtMs,
  };
}
