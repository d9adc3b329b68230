import { notNegative } from '../numeric/guard.js';

/**
 * Volume inside a tube, L: water that stays in a coil or serving line.
 *
 * @param lengthM 0 or more, m.
 * @param boreMm inner diameter, 0 or more, mm.
 * @throws RangeError when negative or not finite.
 * @see volume of a cylinder.
 * @example tubeVolumeL(7.6, 7.9) // 0.37
 */
export function tubeVolumeL(lengthM: number, boreMm: number): number {
  const boreM = notNegative(boreMm, 'A bore', 'mm') / 1000;
  return ((Math.PI * boreM ** 2) / 4) * notNegative(lengthM, 'A length', 'm') * 1000;
}
