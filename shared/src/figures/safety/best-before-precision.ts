import { positive } from '../numeric/guard.js';

export type BestBeforePrecision = 'day-and-month' | 'month-and-year' | 'year';

/**
 * How exactly the European Union wants a best-before date written: day and month up to three months, month and year up to
 * eighteen, the year beyond.
 *
 * @param keepsMonths above 0.
 * @throws RangeError when not above 0 or not finite.
 * @see Regulation (EU) 1169/2011, Annex X (from memory).
 * @example bestBeforePrecision(2) // 'day-and-month'
 */
export function bestBeforePrecision(keepsMonths: number): BestBeforePrecision {
  const months = positive(keepsMonths, 'A shelf life', 'months');
  if (months <= 3) return 'day-and-month';
  return months <= 18 ? 'month-and-year' : 'year';
}
