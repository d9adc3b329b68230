import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { within } from '../numeric/guard.js';

/**
 * Diffusion coefficient of CO2 in water, m²/s.
 *
 * @param tempC 0 to 40 °C.
 * @throws RangeError outside that range.
 * @see B. Jähne, G. Heinz, W. Dietrich 1987, as in the CRC Handbook (fit from memory, within 1 %).
 * @example co2DiffusionM2PerS(20) // 1.67e-9
 */
export function co2DiffusionM2PerS(tempC: number): number {
  const kelvin = celsiusToKelvin(within(tempC, 'A water temperature', 0, 40, '°C'));
  return 5.019e-6 * Math.exp(-19_510 / (GAS_CONSTANT_J_PER_MOL_K * kelvin));
}
