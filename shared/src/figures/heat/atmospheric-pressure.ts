import { KPA_PER_ATM } from '../../units/index.js';
import { within } from '../numeric/guard.js';

/**
 * Mean air pressure at an altitude, kPa absolute. Weather moves the true value by 2 to 3 kPa either way.
 *
 * @param altitudeM -500 to 11 000 m above sea level.
 * @throws RangeError outside that range.
 * @see U.S. Standard Atmosphere, 1976 (the same troposphere as ISO 2533).
 * @example atmosphericPressureKPa(1600) // 83.52
 */
export function atmosphericPressureKPa(altitudeM: number): number {
  const h = within(altitudeM, 'An altitude', -500, 11_000, 'm');
  return KPA_PER_ATM * (1 - (0.0065 * h) / 288.15) ** 5.25588;
}
