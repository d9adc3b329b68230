import { finite, notNegative, positive, within } from '../numeric/guard.js';
import { CO2_CRITICAL_C, co2VapourDensityKgPerM3 } from './co2-saturation.js';

/** Fill by mass over water capacity, for the common class of cylinder (49 CFR 173.304a). */
const FILLING_RATIO = 0.68;

/**
 * CO2 left in a cylinder, g, by weighing: its gauge shows nothing until the liquid is gone. Never below 0.
 *
 * @param weighed scale reading, stamped tare, and what else hangs on it, g.
 * @throws RangeError when negative or not finite.
 * @see mass balance.
 */
export function cylinderLeftG(weighed: { scaleG: number; tareG: number; regulatorG: number }): number {
  const bare = notNegative(weighed.tareG, 'A tare', 'g') + notNegative(weighed.regulatorG, 'A regulator', 'g');
  return Math.max(0, notNegative(weighed.scaleG, 'A scale reading', 'g') - bare);
}

/** Inner volume of a cylinder from its full charge, L. @throws RangeError when out of range. @example cylinderVolumeL(2268) // 3.335 */
export function cylinderVolumeL(fullChargeG: number, fillingRatio = FILLING_RATIO): number {
  return positive(fullChargeG, 'A full charge', 'g') / 1000 / within(fillingRatio, 'A filling ratio', 0.3, 0.8);
}

/**
 * CO2 left when the last liquid is gone and the gauge starts to fall, g. Null above 31 °C, where there is no liquid at all.
 *
 * @param tempC -56 °C and up.
 * @throws RangeError outside these ranges.
 * @see vapour density of Span and Wagner 1996 times the inner volume.
 * @example liquidGoneBelowG(2268, 25) // 810
 */
export function liquidGoneBelowG(fullChargeG: number, tempC: number, fillingRatio = FILLING_RATIO): number | null {
  const volumeL = cylinderVolumeL(fullChargeG, fillingRatio);
  if (finite(tempC, 'A cylinder temperature', '°C') > CO2_CRITICAL_C) return null;
  return co2VapourDensityKgPerM3(tempC) * volumeL;
}
