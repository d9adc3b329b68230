import { formatSignificant } from '../../units/index.js';
import { finite } from '../numeric/guard.js';
import type { Band } from './band.js';

/** A band wider than this from end to end is shown as a band: its middle would promise too much. */
const TOO_WIDE = 4;

/**
 * A band as text, two significant figures: "140 (86–190)"; only the range when it is so wide that the middle says little, and
 * only the value when its ends read the same. "to" stands between ends that have a sign of their own.
 *
 * @throws RangeError when a number is not finite.
 * @example showBand({ low: 0.53, value: 1.1, high: 1.9, grade: 'judged' }) // '1.1 (0.53–1.9)'
 */
export function showBand({ low, value, high }: Band): string {
  const text = (x: number) => formatSignificant(x, 2);
  if (text(low) === text(high)) return text(value);
  const range = low < 0 ? `${text(low)} to ${text(high)}` : `${text(low)}–${text(high)}`;
  return low > 0 && high / low > TOO_WIDE ? range : `${text(value)} (${range})`;
}

/** The same for a pH: two decimals, which is all a meter gives. @throws RangeError when a number is not finite. */
export function showPhBand({ low, value, high }: { low: number; value: number; high: number }): string {
  const text = (ph: number) => finite(ph, 'A pH').toFixed(2);
  return text(low) === text(high) ? text(value) : `${text(value)} (${text(low)}–${text(high)})`;
}
