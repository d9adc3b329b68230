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

/** The base of the leaf at the ends of what is believed, meq/L. */
export interface LeafBaseEnds {
  lowMeqPerL: number;
  highMeqPerL: number;
}

/**
 * The same with the leaf's base at the low, middle and high end of what is believed: 0.6 to 1.7 times, unless `ends` are told.
 * With a lot multiplier from a measured pH, put it into `leafBaseMeqPerL` and take plus or minus 0.1 pH.
 *
 * @throws RangeError as above.
 */
export function drinkPhBand(drink: DrinkAcidity, ends?: LeafBaseEnds): { low: number; value: number; high: number } {
  const at = (leafBaseMeqPerL: number) => drinkPh({ ...drink, leafBaseMeqPerL }).ph;
  const value = at(drink.leafBaseMeqPerL);
  const reach = [
    at(ends?.lowMeqPerL ?? leafBaseBand.low * drink.leafBaseMeqPerL),
    at(ends?.highMeqPerL ?? leafBaseBand.high * drink.leafBaseMeqPerL),
  ];
  // In alkaline water more leaf brings the pH down instead of up.
  return { low: Math.min(value, ...reach), value, high: Math.max(value, ...reach) };
}
