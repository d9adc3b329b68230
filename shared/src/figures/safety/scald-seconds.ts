import { finite } from '../numeric/guard.js';

/** °C and s. The shortest time printed in any table counts; the tables differ by a factor of two. Children burn faster. */
const TABLE: readonly (readonly [number, number])[] = [
  [49, 300],
  [51, 120],
  [52, 90],
  [53, 60],
  [54, 30],
  [55, 17],
  [56, 15],
  [57, 10],
  [60, 3],
  [65, 2],
  [66, 1.5],
  [69, 1],
];
const NO_BURN_BELOW_C = 44;

/**
 * Seconds of contact with hot liquid until a serious burn: the first printed temperature at or above this one, never
 * between two; '<1' above 69 °C, null below 44 °C, where no table goes (Moritz and Henriques 1947, from memory).
 *
 * @param tempC any finite temperature, °C.
 * @throws RangeError when not finite.
 * @see published hot-water burn tables, the most cautious of them.
 * @example scaldSeconds(58) // 3
 */
export function scaldSeconds(tempC: number): number | '<1' | null {
  if (finite(tempC, 'A liquid temperature', '°C') < NO_BURN_BELOW_C) return null;
  return TABLE.find(([at]) => at >= tempC)?.[1] ?? '<1';
}
