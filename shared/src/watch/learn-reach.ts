/** One call to act, and how long the person took from `now` to the act. */
export interface AnsweredCall {
  waitedS: number;
  /** It was called missed before it was done: the person was not there, which says nothing of how fast they are. */
  isMissed: boolean;
}

/** How long one person needs from `now` to the act. */
export interface LearnedReach {
  /** What to tell the ladder, whole seconds; null when it is too little to say. */
  reachS: number | null;
  /** Robust standard deviation of the calls that were answered, s. */
  spreadS: number | null;
  answeredCount: number;
  missedCount: number;
}

const NEWEST_CALLS = 10;
const ENOUGH_CALLS = 4;
export const SHORTEST_REACH_S = 3;
export const LONGEST_REACH_S = 60;
/** A median absolute deviation times this is the standard deviation of normal numbers. */
const MAD_TO_SD = 1.4826;

/**
 * The reach of a person from their newest ten calls, the newest last: the median, so that one odd call does not count, rounded up to whole
 * seconds from 3 to 60. Too little to say below four answered calls.
 */
export function learnedReach(calls: readonly AnsweredCall[]): LearnedReach {
  const newest = calls.slice(-NEWEST_CALLS);
  const waits = newest.filter(({ isMissed }) => !isMissed).map(({ waitedS }) => waitedS);
  const counts = { answeredCount: waits.length, missedCount: newest.length - waits.length };
  if (waits.length < ENOUGH_CALLS) return { reachS: null, spreadS: null, ...counts };
  const middle = median(waits);
  return {
    reachS: Math.min(LONGEST_REACH_S, Math.max(SHORTEST_REACH_S, Math.ceil(middle))),
    spreadS: MAD_TO_SD * median(waits.map((waitedS) => Math.abs(waitedS - middle))),
    ...counts,
  };
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length / 2;
  return (sorted[Math.ceil(half) - 1]! + sorted[Math.floor(half)]!) / 2;
}
