import { believe, lagBelief } from './bank.js';
import { CHILLING_C_PER_S, type Surroundings } from './slope-law.js';
import type { Tally, WatchState } from './state.js';
import type { WatchLearned } from './types.js';

/** Seconds after a disturbance before the slope is worth learning from. */
const SETTLED_AFTER_S = 45;
/** A slope less sure than this share of itself teaches nothing. */
const SURE_SHARE = 0.15;
/** Samples that make a constant worth saving. */
const ENOUGH = 8;
/** What a told lag may be off by anyway. */
const LARGEST_LAG_ERROR = 0.25;
/** Below this distance to the surroundings the quotient is noise. */
const LEAST_DRIVE_C = 10;

/** Adds what the slope says now, where it says anything. */
export function tallied(
  state: WatchState,
  bank: readonly number[],
  atMs: number,
  around: Surroundings,
): Pick<WatchState, 'lossesPerS' | 'chillerPerS'> {
  const { lossesPerS, chillerPerS } = state;
  const settledMs = state.disturbedAtMs ?? state.firstGoodAtMs ?? atMs;
  const { tempC, rateCPerS, rateVariance } = believe(bank);
  const fall = -rateCPerS;
  const isSure = fall > 0 && Math.sqrt(Math.max(0, rateVariance)) < SURE_SHARE * fall;
  if (!isSure || state.kettle.heating || atMs - settledMs < SETTLED_AFTER_S * 1000) return { lossesPerS, chillerPerS };
  if (state.kettle.chilling && state.config.coolantC !== null && tempC - around.coolantC > LEAST_DRIVE_C) {
    return { lossesPerS, chillerPerS: withSample(chillerPerS, fall / (tempC - around.coolantC)) };
  }
  const isAlone = !state.kettle.chilling && fall < CHILLING_C_PER_S && state.config.roomC !== null;
  if (isAlone && tempC - around.roomC > LEAST_DRIVE_C) {
    return { chillerPerS, lossesPerS: withSample(lossesPerS, fall / (tempC - around.roomC)) };
  }
  return { lossesPerS, chillerPerS };
}

function withSample({ mean, count }: Tally, sample: number): Tally {
  return { mean: mean + (sample - mean) / (count + 1), count: count + 1 };
}

/**
 * What the run has taught, to be offered for saving when it ends: tell it to the next run's watch. The lag is worth more the
 * more often the slope changed.
 */
export function learnedFrom(state: WatchState): WatchLearned {
  const lag = state.bank === null ? null : lagBelief(state.bank, state.config);
  const constant = ({ mean, count }: Tally) => (count >= ENOUGH ? mean : null);
  return {
    lagS: lag?.lagS ?? null,
    // Two standard deviations: the told error is the largest that may be, not the usual one.
    lagErrorRatio: lag && Math.min(LARGEST_LAG_ERROR, (2 * lag.sdS) / lag.lagS),
    lossesPerS: constant(state.lossesPerS),
    chillerPerS: constant(state.chillerPerS),
  };
}
