import { bisect } from '../numeric/bisect.js';
import { within } from '../numeric/guard.js';
import { atmosphericPressureKPa } from './atmospheric-pressure.js';
import { waterVapourPressureKPa } from './vapour-pressure.js';

/**
 * Temperature at which water boils at a local (station) pressure, °C.
 *
 * @param pressureKPa 5 to 1500 kPa absolute.
 * @throws RangeError outside that range.
 * @see IAPWS SR1-86 (vapour-pressure.ts), solved for temperature. At 101.325 kPa this is 99.97 °C on today's scale.
 * @example boilingPointC(95) // 98.18
 */
export function boilingPointC(pressureKPa: number): number {
  const target = within(pressureKPa, 'A station pressure', 5, 1500, 'kPa');
  return bisect((tempC) => waterVapourPressureKPa(tempC) - target, 0, 250, true);
}

/**
 * The same from altitude alone, °C: right within 0.8 K, because weather is not in it.
 *
 * @param altitudeM -500 to 11 000 m.
 * @throws RangeError outside that range.
 * @example boilingPointAtAltitudeC(1500) // 94.98
 */
export function boilingPointAtAltitudeC(altitudeM: number): number {
  return boilingPointC(atmosphericPressureKPa(altitudeM));
}
