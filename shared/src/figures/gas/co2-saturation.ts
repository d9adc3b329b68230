import { celsiusToKelvin } from '../../units/index.js';
import { within } from '../numeric/guard.js';

const CRITICAL_K = 304.1282;
const CRITICAL_KPA = 7377.3;
const CRITICAL_KG_PER_M3 = 467.6;
/** Above this a cylinder holds no liquid, °C. */
export const CO2_CRITICAL_C = CRITICAL_K - 273.15;

function distance(tempC: number): number {
  return 1 - celsiusToKelvin(within(tempC, 'A cylinder temperature', -56, CO2_CRITICAL_C, '°C')) / CRITICAL_K;
}

/**
 * Pressure over liquid CO2, kPa absolute: what the gauge of a cylinder shows while there is liquid in it.
 *
 * @param tempC -56 to 30.98 °C.
 * @throws RangeError outside that range: above it there is no liquid.
 * @see R. Span and W. Wagner, J. Phys. Chem. Ref. Data 25, 1509, 1996 (coefficients from memory, they match the tables).
 * @example co2SaturationKPa(20) // 5729
 */
export function co2SaturationKPa(tempC: number): number {
  const th = distance(tempC);
  const series = -7.0602087 * th + 1.9391218 * th ** 1.5 - 1.6463597 * th ** 2 - 3.2995634 * th ** 4;
  return CRITICAL_KPA * Math.exp(series / (1 - th));
}

/**
 * Density of the gas over liquid CO2, kg/m³ (g/L).
 *
 * @param tempC -56 to 30.98 °C.
 * @throws RangeError outside that range.
 * @see Span and Wagner 1996 (coefficients from memory, they match the tables).
 * @example co2VapourDensityKgPerM3(20) // 194
 */
export function co2VapourDensityKgPerM3(tempC: number): number {
  const th = distance(tempC);
  const series =
    -1.7074879 * th ** 0.34 -
    0.8227467 * th ** 0.5 -
    4.6008549 * th -
    10.111178 * th ** (7 / 3) -
    29.742252 * th ** (14 / 3);
  return CRITICAL_KG_PER_M3 * Math.exp(series);
}
