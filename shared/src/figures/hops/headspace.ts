import { notNegative, positive } from '../numeric/guard.js';

/** Air over water concentration at 25 °C (R. Sander, Henry's law constants v5, 2023, computed). Boiling points mislead. */
export const airWaterRatio = { limonene: 0.86, alphaPinene: 5.8, terpeneAlcohol: 0.002 } as const;

/** kelvin of the temperature slope. */
const SLOPE_K = 4700;

/**
 * Share of an aroma substance that sits in the air over the drink, 0 to 1: what a vent takes with it.
 *
 * @param ratio air over water concentration, 0 or more.
 * @param liquidL above 0, L.
 * @param gasL 0 or more, L.
 * @throws RangeError outside these ranges.
 * @see equilibrium of the two volumes.
 * @example headspaceRatio(0.86, 20, 5) // 0.18
 */
export function headspaceRatio(ratio: number, liquidL: number, gasL: number): number {
  const gas = notNegative(ratio, 'An air-water ratio') * notNegative(gasL, 'A headspace', 'L');
  return gas / (gas + positive(liquidL, 'A volume', 'L'));
}

/** The same ratio at another temperature; each 10 °C is about 1.6 times (Sander 2023). @throws RangeError when not finite. */
export function airWaterRatioAt(ratioAt25: number, tempC: number): number {
  const kelvin = positive(tempC + 273.15, 'A temperature', 'K');
  return notNegative(ratioAt25, 'An air-water ratio') * Math.exp(-SLOPE_K * (1 / kelvin - 1 / 298.15));
}
