import { twoPointCorrection, type ProbeCorrection } from '../figures/index.js';

/** What a probe showed at two points that are known: ice water and boiling water, or a reference beside it. */
export interface CalibrationPoints {
  low: { shownC: number; trueC: number };
  high: { shownC: number; trueC: number };
}

export type CalibrationVerdict =
  | { kind: 'accepted'; correction: ProbeCorrection }
  | { kind: 'refused'; reason: 'swapped' | 'too-close' | 'slope' | 'offset'; at: 'low' | 'high' };

/** A line through two points that lie closer together says little about the rest. Our choice. */
export const LEAST_SPAN_K = 30;

/**
 * The correction that two points give, or why they give none. The low point need not be ice: the line is taken through the point as it is.
 *
 * @param points shown and true temperatures, °C; any finite numbers.
 * @throws RangeError when one is not finite.
 * @see twoPointCorrection (figures), which decides about slope and offset.
 */
export function calibrationOf({ low, high }: CalibrationPoints): CalibrationVerdict {
  const numbers = [low.shownC, low.trueC, high.shownC, high.trueC];
  if (!numbers.every(Number.isFinite))
    throw new RangeError(`Calibration points must be finite, got ${numbers.join(', ')}`);
  if (high.trueC - low.trueC < LEAST_SPAN_K)
    return { kind: 'refused', reason: high.trueC < low.trueC ? 'swapped' : 'too-close', at: 'high' };
  if (high.shownC <= low.shownC) return { kind: 'refused', reason: 'swapped', at: 'high' };
  // Moved so that the low point is 0, where the figure expects the ice.
  const line = twoPointCorrection(low.shownC - low.trueC, high.shownC - low.trueC, high.trueC - low.trueC);
  if (line.kind === 'refused')
    return { kind: 'refused', reason: line.reason, at: line.reason === 'offset' ? 'low' : 'high' };
  const { slope } = line.correction;
  return { kind: 'accepted', correction: { slope, offsetC: low.trueC - slope * low.shownC } };
}

/** Why a pair is not taken and what to do, without a number that has a unit. */
export const calibrationRefusalWords: Readonly<
  Record<Extract<CalibrationVerdict, { kind: 'refused' }>['reason'], string>
> = {
  swapped: 'The hot point must be the higher one, in both columns. Were the two swapped?',
  'too-close': 'The two points lie too close together. Take ice water and boiling water.',
  slope:
    'Between the two points it moved over 3 % more or less than the water did. That is another probe, or a bath that was not ready. Measure both again.',
  offset:
    'In the cold water it was off by more than any good probe is. Check the ice bath, or the probe itself, and measure again.',
};
