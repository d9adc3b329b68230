import { celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';

const CRITICAL_K = 647.096;
const CRITICAL_KPA = 22_064;

/**
 * Pressure of water vapour over water at rest with it, kPa absolute.
 *
 * @param tempC 0 to 373.9 °C (the formula starts at 0.01 °C; at 0 it is carried on by a hundredth of a degree).
 * @throws RangeError outside that range.
 * @see IAPWS SR1-86(1992); W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22, 783, 1993 (coefficients from memory; they
 * agree with IAPWS-IF97 within 0.02 %).
 * @example waterVapourPressureKPa(82) // 51.39
 */
export function waterVapourPressureKPa(tempC: number): number {
  const kelvin = celsiusToKelvin(within(tempC, 'A water temperature', 0, 373.9, '°C'));
  const th = 1 - kelvin / CRITICAL_K;
  // Powers by half steps: this is called for every point of a recorded curve, and `**` with a fraction is slow.
  const root = Math.sqrt(th);
  const cube = th * th * th;
  const series =
    -7.85951783 * th +
    1.84408259 * th * root -
    11.7866497 * cube +
    22.6807411 * cube * root -
    15.9618719 * cube * th +
    1.80122502 * cube * cube * th * root;
  return CRITICAL_KPA * Math.exp((CRITICAL_K / kelvin) * series);
}
