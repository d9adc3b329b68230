import { ionMolarMass } from '../water/ions.js';
import { drinkSolution, type DrinkAcidity } from './drink-acidity.js';
import { solvePh, type PhResult } from './solve-ph.js';

/**
 * pH of a drink with the complexes of calcium and magnesium with citrate, which drinkPh leaves out: a second line beside it for
 * water with more than about 50 mg/L of calcium. 0.01 to 0.06 lower at 110 mg/L. Doses and the lot multiplier stay without
 * them; a measured pH takes the difference in.
 *
 * @throws RangeError when a number is out of range, or the water's charges differ by more than 20 %.
 * @see metal-citrate.ts; constants at 25 °C.
 */
export function complexedDrinkPh(drink: DrinkAcidity): PhResult {
  return solvePh({
    ...drinkSolution(drink),
    citrateMetals: {
      calciumMolPerL: drink.water.ca / 1000 / ionMolarMass.ca,
      magnesiumMolPerL: drink.water.mg / 1000 / ionMolarMass.mg,
    },
  });
}
