import { notNegative, positive } from '../numeric/guard.js';

/** Where a batch is, L. */
export interface BatchWhereabouts {
  producedL: number;
  onHandL: number;
  deliveredL: number;
  samplesL: number;
  /** Foam, lines, spills. */
  lossesL: number;
}

/** Accounted for well enough; a rule of this tool. */
const GOOD_PERCENT = { from: 98, to: 102 } as const;

/**
 * How much of a batch is accounted for, %, for a recall drill; good from 98 to 102.
 *
 * @param batch produced above 0 L, all else 0 L or more.
 * @throws RangeError outside these ranges.
 * @see volume balance.
 * @example massBalance({ producedL: 40, onHandL: 18.5, deliveredL: 19, samplesL: 0.6, lossesL: 1.5 }).percent // 99.0
 */
export function massBalance(batch: BatchWhereabouts): { percent: number; good: boolean } {
  const found =
    notNegative(batch.onHandL, 'A volume on hand', 'L') +
    notNegative(batch.deliveredL, 'A volume delivered', 'L') +
    notNegative(batch.samplesL, 'A volume of samples', 'L') +
    notNegative(batch.lossesL, 'A volume lost', 'L');
  const percent = (100 * found) / positive(batch.producedL, 'A volume produced', 'L');
  return { percent, good: percent >= GOOD_PERCENT.from && percent <= GOOD_PERCENT.to };
}
