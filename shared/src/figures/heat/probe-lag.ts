import { positive } from '../numeric/guard.js';

export interface ProbeLag {
  /** Time constant, s. */
  tauS: number;
  /** Time before it moves at all, s. */
  deadTimeS: number;
  /** How late it shows a crossing on a steady ramp, s. */
  rampLagS: number;
}

/**
 * Probe lag from a step test: move the probe from room air into stirred ice water, and note when it has done half and nine
 * tenths of the way.
 *
 * @param t50S above 0, s.
 * @param t90S above `t50S`, s.
 * @throws RangeError outside these ranges.
 * @see first order with dead time: tau = (t90 - t50)/ln 5, dead time = t50 - tau ln 2, not below 0.
 * @example probeLag(5.2, 9.8) // tau 2.86 s, dead time 3.22 s
 */
export function probeLag(t50S: number, t90S: number): ProbeLag {
  const half = positive(t50S, 'A time to half', 's');
  const tauS = positive(t90S - half, 'The time from half to nine tenths', 's') / Math.log(5);
  const deadTimeS = Math.max(0, half - Math.LN2 * tauS);
  return { tauS, deadTimeS, rampLagS: tauS + deadTimeS };
}
