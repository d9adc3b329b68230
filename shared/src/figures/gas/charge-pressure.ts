import { KPA_PER_ATM } from '../../units/index.js';
import { bisect } from '../numeric/bisect.js';
import { notNegative } from '../numeric/guard.js';
import { co2GPerL } from './co2-solubility.js';
import { co2GPerLFromVolumes } from './co2-volumes.js';
import { gaugeFromAbsoluteKPa } from './gauge.js';

/** End of the solubility model, kPa absolute. */
const MAX_KPA = 1100;

/**
 * Absolute pressure at which the drink comes to rest with so much CO2 in it, kPa; null when no pressure up to 1100 kPa does.
 *
 * @param gPerL 0 or more, g/L.
 * @param tempC 0 to 40 °C.
 * @throws RangeError outside these ranges.
 * @see Weiss 1974 (co2-solubility.ts), solved for pressure; take plus or minus 3 % as the truth.
 */
export function equilibriumAbsoluteKPa(gPerL: number, tempC: number): number | null {
  const wanted = notNegative(gPerL, 'A CO2 content', 'g/L');
  if (co2GPerL(tempC, MAX_KPA) < wanted) return null;
  return bisect((kPa) => co2GPerL(tempC, kPa) - wanted, 0, MAX_KPA, true);
}

/**
 * What to set on the gauge so that the drink comes to rest at so many volumes, kPa gauge; null when it cannot be reached.
 * Negative means that it would only stay in under less than the local air: no pressure needs to be set.
 *
 * @param charge volumes 0 or more (real gas), temperature 0 to 40 °C, station pressure 20 to 120 kPa (sea level unless told).
 * @throws RangeError outside these ranges.
 * @example chargeGaugeKPa({ volumes: 2.5, tempC: 4 }) // 72.7 at sea level; 90.5 at 1600 m
 */
export function chargeGaugeKPa(charge: { volumes: number; tempC: number; stationKPa?: number }): number | null {
  const absoluteKPa = equilibriumAbsoluteKPa(co2GPerLFromVolumes(charge.volumes), charge.tempC);
  return absoluteKPa === null ? null : gaugeFromAbsoluteKPa(absoluteKPa, charge.stationKPa ?? KPA_PER_ATM);
}
