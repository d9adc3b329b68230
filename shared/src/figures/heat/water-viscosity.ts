import { celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';

/** Factor in 1e-6 Pa s, and power of T/300 K. */
const TERMS = [
  [280.68, -1.9],
  [511.45, -7.7],
  [61.131, -19.6],
  [0.45903, -40],
] as const;

/**
 * Viscosity of water at 1 atm, Pa s.
 *
 * @param tempC 0 to 100 °C.
 * @throws RangeError outside that range.
 * @see IAPWS, supplementary release on water at 0.1 MPa, SR6-08 (coefficients from memory).
 * @example waterViscosityPaS(4) // 1.57e-3
 */
export function waterViscosityPaS(tempC: number): number {
  const reduced = celsiusToKelvin(within(tempC, 'A water temperature', 0, 100, '°C')) / 300;
  return TERMS.reduce((sum, [factor, power]) => sum + factor * reduced ** power, 0) * 1e-6;
}
