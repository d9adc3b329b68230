import { notNegative } from '../numeric/guard.js';

/** Ethanol g per g sugar, CO2 g per g sugar, ethanol density kg/L (from memory). */
const ETHANOL_PER_SUGAR = 0.511;
const CO2_PER_SUGAR = 0.489;
const ETHANOL_KG_PER_L = 0.789;

/**
 * Alcohol that sugar makes if yeast finds all of it, % by volume.
 *
 * @param sugarGPerL 0 or more, g/L.
 * @throws RangeError when negative or not finite.
 * @see stoichiometry of fermentation (constants from memory).
 * @example abvFromFermentedSugar(7.7) // 0.5
 */
export function abvFromFermentedSugar(sugarGPerL: number): number {
  return (notNegative(sugarGPerL, 'Sugar', 'g/L') * ETHANOL_PER_SUGAR) / ETHANOL_KG_PER_L / 10;
}

/** Sugar that makes so much alcohol, g/L. @throws RangeError when negative. @example sugarForAbvGPerL(0.5) // 7.7 */
export function sugarForAbvGPerL(abvPercent: number): number {
  return (notNegative(abvPercent, 'Alcohol', '%') * 10 * ETHANOL_KG_PER_L) / ETHANOL_PER_SUGAR;
}

/** CO2 that the same sugar makes, g/L. @throws RangeError when negative. */
export function co2FromFermentedSugarGPerL(sugarGPerL: number): number {
  return notNegative(sugarGPerL, 'Sugar', 'g/L') * CO2_PER_SUGAR;
}
