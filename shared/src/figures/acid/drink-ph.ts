import { drinkSolution, type DrinkAcidity } from './drink-acidity.js';
import { leafBaseBand } from './leaf-base.js';
import { solvePh, type PhResult } from './solve-ph.js';

/**
 * pH of a drink, with ionic strength and buffer value.
 *
 * @throws RangeError when a number is out of range, or the water's charges differ by more than 20 %.
 * @see solve-ph.ts; leaf-base.ts for what tea and hops do.
 */
export function drinkPh(drink: DrinkAcidity): PhResult {
  return solvePh(drinkSolution(drink));
}

/**
 * The same with the leaf's base at the low, middle and high end of what is believed (0.6, 1.0, 1.7 times). With a lot
 * multiplier from a measured pH, put it into `leafBaseMeqPerL` and take plus or minus 0.1 pH.
 *
 * @throws RangeError as above.
 */
export function drinkPhBand(drink: DrinkAcidity): { low: number; value: number; high: number } {
  const at = (factor: number) => drinkPh({ ...drink, leafBaseMeqPerL: factor * drink.leafBaseMeqPerL }).ph;
  const value = at(leafBaseBand.middle);
  const ends = [at(leafBaseBand.low), at(leafBaseBand.high)];
  // In alkaline water more leaf brings the pH down instead of up.
  return { low: Math.min(value, ...ends), value, high: Math.max(value, ...ends) };
}
