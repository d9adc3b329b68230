import { celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';

/**
 * Mole fraction of CO2 in water at rest under a CO2 pressure, the wider correlation: for kegs left in heat, and as a second
 * opinion on Weiss. Up to 4 % away from it in the cold.
 *
 * @param tempC 0 to 160 °C.
 * @param co2KPa partial pressure of CO2, 0 to 1000 kPa.
 * @throws RangeError outside these ranges.
 * @see J. J. Carroll, J. D. Slupsky, A. E. Mather, J. Phys. Chem. Ref. Data 20(6), 1201-1209, 1991.
 * @example co2MoleFractionHot(60, 100) // 0.000300
 */
export function co2MoleFractionHot(tempC: number, co2KPa: number): number {
  const k = celsiusToKelvin(within(tempC, 'A drink temperature', 0, 160, '°C'));
  const henryMPa = Math.exp(-6.8346 + 1.2817e4 / k - 3.7668e6 / k ** 2 + 2.997e8 / k ** 3);
  return within(co2KPa, 'A CO2 pressure', 0, 1000, 'kPa') / 1000 / henryMPa;
}
