/** One avoirdupois ounce in grams, exact: a sixteenth of the pound of 453.59237 g (International Yard and Pound, 1959). */
export const GRAMS_PER_OUNCE = 28.349523125;

/** Mass, g to oz (avoirdupois). Any number; NaN stays NaN. */
export function gramsToOunces(massG: number): number {
  return massG / GRAMS_PER_OUNCE;
}

/** Mass, oz (avoirdupois) to g. Any number; NaN stays NaN. */
export function ouncesToGrams(massOz: number): number {
  return massOz * GRAMS_PER_OUNCE;
}
