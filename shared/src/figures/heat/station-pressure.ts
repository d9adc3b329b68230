import { KPA_PER_ATM } from '../../units/index.js';
import { within } from '../numeric/guard.js';
import { atmosphericPressureKPa } from './atmospheric-pressure.js';

/**
 * Pressure where one stands, from the pressure a forecast prints, which is reduced to sea level. kPa absolute; good to
 * about 0.5 kPa below 1000 m.
 *
 * @param seaLevelKPa 85 to 110 kPa.
 * @param altitudeM -500 to 11 000 m.
 * @throws RangeError outside these ranges.
 * @see scaled by the U.S. Standard Atmosphere, 1976 (computed).
 * @example stationPressureKPa(101.325, 500) // 95.46
 */
export function stationPressureKPa(seaLevelKPa: number, altitudeM: number): number {
  return (
    (within(seaLevelKPa, 'A sea-level pressure', 85, 110, 'kPa') * atmosphericPressureKPa(altitudeM)) / KPA_PER_ATM
  );
}
