import { solve } from './solve.js';

/**
 * The best that any unbiased estimator can do (Cramér-Rao) with white Gaussian noise; see S. M. Kay, "Fundamentals of
 * Statistical Signal Processing: Estimation Theory", ch. 3, 1993. A watch that claims less is fooling itself.
 */

export interface LineBoundInput {
  /** Standard deviation of one reading in K. */
  noiseC: number;
  /** |dT/dt| in K/s. */
  rateCPerS: number;
  periodS: number;
  /** Readings used, ending now; 2 or more. */
  count: number;
  /** From now to the crossing. */
  horizonS: number;
}

/** Least standard deviation, in seconds, of a crossing time forecast from a straight line. */
export function lineCrossingSdS({ noiseC, rateCPerS, periodS, count, horizonS }: LineBoundInput): number {
  const lever = horizonS + ((count - 1) * periodS) / 2;
  const spread = periodS ** 2 * count * (count ** 2 - 1);
  return (noiseC / rateCPerS) * Math.sqrt(1 / count + (12 * lever ** 2) / spread);
}

/** Noise of a straight line over `count` readings, extrapolated by the probe's lag, as a multiple of one reading's noise. */
export function lagCorrectedLineGain(lagS: number, periodS: number, count: number): number {
  return lineCrossingSdS({ noiseC: 1, rateCPerS: 1, periodS, count, horizonS: lagS });
}

/** Noise of `reading + lag * (difference of two readings) / period`, as a multiple of one reading's noise: why nobody should. */
export function lagCorrectedDifferenceGain(lagS: number, periodS: number): number {
  const ratio = lagS / periodS;
  return Math.hypot(1 + ratio, ratio);
}

export interface NewtonBoundInput {
  noiseC: number;
  /** Rate constant k in 1/s. */
  perS: number;
  environmentC: number;
  nowC: number;
  targetC: number;
  periodS: number;
  count: number;
  /** True when the temperature of the surroundings is fitted too instead of measured. */
  environmentFitted: boolean;
}

/** Least standard deviation, in seconds, of a crossing time forecast from an exponential. */
export function newtonCrossingSdS(input: NewtonBoundInput): number {
  const { noiseC, perS, environmentC, nowC, targetC, periodS, count, environmentFitted } = input;
  const above = nowC - environmentC;
  const crossingS = Math.log(above / (targetC - environmentC)) / perS;
  const size = environmentFitted ? 3 : 2;
  const information = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  for (let i = 0; i < count; i += 1) {
    const t = -i * periodS;
    const decay = Math.exp(-perS * t);
    const column = [decay, -above * t * decay, 1].slice(0, size);
    for (const [row, a] of column.entries()) {
      for (const [col, b] of column.entries()) information[row]![col]! += (a * b) / noiseC ** 2;
    }
  }
  const gradient = [1 / (perS * above), -crossingS / perS, 1 / (perS * (targetC - environmentC))].slice(0, size);
  const solved = solve(information, gradient);
  return Math.sqrt(gradient.reduce((sum, g, i) => sum + g * (solved[i] ?? 0), 0));
}
