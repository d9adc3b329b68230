import { notNegative, within } from '../numeric/guard.js';

/** Storage index of hops fresh from harvest. */
const FRESH_INDEX = 0.25;
/** Percent lost per tenfold index; 101.8 to 114.6 by crop year. */
const LOSS_SLOPE = 110;

/**
 * Alpha and beta acids lost since harvest, %, by the hop storage index of the lot (0 to 100).
 *
 * @param storageIndex 0.2 to 2.5; at or below 0.25 nothing is lost.
 * @param slope 90 to 130; 110 unless the crop year's is known.
 * @throws RangeError outside these ranges.
 * @see G. B. Nickerson, S. T. Likens, J. ASBC 37, 184, 1979.
 * @example alphaLossPercent(0.28) // 5.4
 */
export function alphaLossPercent(storageIndex: number, slope = LOSS_SLOPE): number {
  const index = within(storageIndex, 'A hop storage index', 0.2, 2.5);
  return Math.min(100, Math.max(0, within(slope, 'A loss slope', 90, 130) * Math.log10(index / FRESH_INDEX)));
}

/** Loss a day, cold to room warm, from low to high (Purdue University thesis on pellet storage, 2020). */
const AGE_LOSS_PER_DAY = { low: 9.3e-4, value: 1.2e-3, high: 1.6e-3 } as const;

export interface AlphaNow {
  low: number;
  value: number;
  high: number;
  from: 'storage-index' | 'age';
}

/**
 * Alpha acids of a lot today, % of its mass.
 *
 * @param lot alpha at harvest 0 to 30 %; its storage index, or its age in days at 4 to 25 °C.
 * @throws RangeError outside these ranges.
 * @see Nickerson and Likens 1979 by index (within 1.3 points); first order by age (Purdue 2020).
 */
export function alphaNowPercent(
  lot: { harvestPercent: number } & ({ storageIndex: number } | { ageDays: number }),
): AlphaNow {
  const harvest = within(lot.harvestPercent, 'Alpha at harvest', 0, 30, '%');
  if ('storageIndex' in lot) {
    const loss = alphaLossPercent(lot.storageIndex);
    const left = (percent: number) => harvest * (1 - Math.min(100, Math.max(0, percent)) / 100);
    return { low: left(loss + 1.3), value: left(loss), high: left(loss - 1.3), from: 'storage-index' };
  }
  const days = notNegative(lot.ageDays, 'An age', 'days');
  const left = (perDay: number) => harvest * Math.exp(-perDay * days);
  return {
    low: left(AGE_LOSS_PER_DAY.high),
    value: left(AGE_LOSS_PER_DAY.value),
    high: left(AGE_LOSS_PER_DAY.low),
    from: 'age',
  };
}
