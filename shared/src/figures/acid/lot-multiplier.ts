import { within } from '../numeric/guard.js';
import { drinkSolution, type DrinkAcidity } from './drink-acidity.js';
import { leafBase } from './leaf-base.js';
import { amountAtPh } from './linear-at-ph.js';

const MOST_TIMES = 20;

/**
 * By how much the base of this tea and these hops differs from the default, from one measured pH: keep it with the lots, and
 * the next prediction is good to about 0.1 pH. Null when no multiplier from 0 to 20 explains the pH: measure again, degassed
 * and at 20 to 25 °C.
 *
 * @param drink as it was made; its leaf base as the defaults give it, above 0 meq/L.
 * @param measuredPh still, degassed, 1 to 9.
 * @throws RangeError when a number is out of range.
 * @see solve-ph.ts, solved for the leaf's base.
 */
export function lotMultiplier(drink: DrinkAcidity, measuredPh: number): number | null {
  const ph = within(measuredPh, 'A measured pH', 1, 9);
  const leaf = leafBase(drink.leafBaseMeqPerL);
  const bare = drinkSolution({ ...drink, leafBaseMeqPerL: 0 });
  const unit = { acidsMolPerL: {}, strongIonEqPerL: leaf.strongIonEqPerL, sites: leaf.sites, tempC: drink.tempC };
  const times = amountAtPh(bare, unit, ph, MOST_TIMES);
  return times !== null && times >= 0 ? times : null;
}
