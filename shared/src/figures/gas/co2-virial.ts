import { celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';

/**
 * Second virial coefficient of CO2: how far it is from an ideal gas, cm³/mol (negative).
 *
 * @param tempC -8 to 92 °C.
 * @throws RangeError outside that range.
 * @see R. F. Weiss, Marine Chemistry 2, 203-215, 1974 (coefficients from memory; they give 22.264 L/mol at 0 °C, 1 atm).
 * @example co2VirialCm3PerMol(0) // -150
 */
export function co2VirialCm3PerMol(tempC: number): number {
  const k = celsiusToKelvin(within(tempC, 'A gas temperature', -8, 92, '°C'));
  return -1636.75 + k * (12.0408 + k * (-3.27957e-2 + k * 3.16528e-5));
}
