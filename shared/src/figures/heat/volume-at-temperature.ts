import { notNegative } from '../numeric/guard.js';
import { waterDensityKgPerM3 } from './water-density.js';

/** Volumes are stored as they would read at this temperature, °C. */
export const STORED_VOLUME_C = 20;

/**
 * What a volume of water reads at another temperature, in L: the mass stays. The vessel's own expansion (0.3 % from 20 to
 * 82 °C for steel) is left out.
 *
 * @param volumeL 0 or more, L, as read at `fromC`.
 * @param fromC 0 to 150 °C.
 * @param toC 0 to 150 °C.
 * @throws RangeError outside these ranges.
 * @see Kell 1975 (water-density.ts).
 * @example volumeAtTemperatureL(20, 82, 20) // 19.45: 20 L read hot is 19.45 L cold
 */
export function volumeAtTemperatureL(volumeL: number, fromC: number, toC: number): number {
  return (notNegative(volumeL, 'A volume', 'L') * waterDensityKgPerM3(fromC)) / waterDensityKgPerM3(toC);
}
