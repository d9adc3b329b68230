import { finite, notNegative, positive } from '../numeric/guard.js';

/**
 * Temperature after a time of cooling (or warming) toward a constant surrounding, °C.
 *
 * @param fromC start, °C.
 * @param surroundC what it tends to, °C.
 * @param kPerS cooling constant, 0 or more, 1/s.
 * @param durationS 0 or more, s.
 * @throws RangeError outside these ranges.
 * @see Newton's law of cooling. An open hot pot does not follow it: see power-law-cooling.ts.
 * @example newtonTempC(85, 22, 2e-4, 600) // 77.88
 */
export function newtonTempC(fromC: number, surroundC: number, kPerS: number, durationS: number): number {
  const decay = Math.exp(-notNegative(kPerS, 'A cooling constant', '1/s') * notNegative(durationS, 'A duration', 's'));
  const surround = finite(surroundC, 'A surrounding temperature', '°C');
  return surround + (finite(fromC, 'A start temperature', '°C') - surround) * decay;
}

/**
 * Time to reach a temperature, s; null when it never does, because the target is not between the start and the
 * surrounding. 0 when it is there already.
 *
 * @param kPerS cooling constant, above 0, 1/s.
 * @throws RangeError when an input is not finite or k is not above 0.
 * @see Newton's law of cooling, solved for time.
 * @example newtonDurationS(85, 77, 22, 2e-4) // 679 s
 */
export function newtonDurationS(fromC: number, toC: number, surroundC: number, kPerS: number): number | null {
  const surround = finite(surroundC, 'A surrounding temperature', '°C');
  const from = finite(fromC, 'A start temperature', '°C') - surround;
  const to = finite(toC, 'A target temperature', '°C') - surround;
  const k = positive(kPerS, 'A cooling constant', '1/s');
  if (from === to) return 0;
  const share = from / to;
  return Number.isFinite(share) && share > 1 ? Math.log(share) / k : null;
}

/**
 * Cooling constant from two temperatures of one fall, 1/s; null when they are not a fall toward the surrounding.
 *
 * @param durationS time between the two, above 0, s.
 * @throws RangeError when an input is not finite or the duration is not above 0.
 * @see Newton's law of cooling, solved for k.
 * @example newtonConstantPerS(85, 77.88, 22, 600) // 2.0e-4
 */
export function newtonConstantPerS(fromC: number, toC: number, surroundC: number, durationS: number): number | null {
  const surround = finite(surroundC, 'A surrounding temperature', '°C');
  const from = finite(fromC, 'A start temperature', '°C') - surround;
  const share = from / (finite(toC, 'A later temperature', '°C') - surround);
  const duration = positive(durationS, 'A duration', 's');
  return Number.isFinite(share) && share > 1 ? Math.log(share) / duration : null;
}
