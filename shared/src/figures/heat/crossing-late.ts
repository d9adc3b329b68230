import { notNegative } from '../numeric/guard.js';

/**
 * How late a probe shows a crossing while the liquid cools by Newton's law, s: -ln(1 - k lag)/k. On a straight ramp (k = 0) it
 * is the lag itself. Infinity when the probe cannot follow (k times lag is 1 or more).
 *
 * @param lagS time constant of the probe, 0 or more, s.
 * @param kPerS rate constant of the cooling, 0 or more, 1/s.
 * @throws RangeError when either is negative or not a number.
 * @see first-order response to an exponential, solved for the time of equal temperature.
 * @example crossingLateS(10, 1 / 400) // 10.127
 */
export function crossingLateS(lagS: number, kPerS: number): number {
  const product = notNegative(lagS, 'A lag', 's') * notNegative(kPerS, 'A rate constant', '1/s');
  if (product >= 1) return Infinity;
  return product < 1e-9 ? lagS : -Math.log1p(-product) / kPerS;
}
