import { entryOf, within } from '../numeric/guard.js';
import { acidKinds, acidMassG, type AcidKind } from './acids.js';
import { drinkSolution, type DrinkAcidity } from './drink-acidity.js';
import { amountAtPh } from './linear-at-ph.js';
import { solvePh } from './solve-ph.js';

const MOST_MOL_PER_L = 2;

export type AcidDose =
  | { kind: 'add'; molPerL: number; gPerL: number }
  /** It is at or below the target as it is. */
  | { kind: 'none-needed'; ph: number }
  /** Not with this acid: more than 2 mol/L, or too weak an acid for that pH. */
  | { kind: 'never' };

/**
 * Acid that brings a drink to a still pH, beside what is in it already.
 *
 * @param drink see DrinkAcidity.
 * @param targetPh 1 to 8.
 * @param acid what is in the jar; `gPerL` is of the pure acid unless `strengthPercent` is told.
 * @throws RangeError when a number is out of range, or the water's charges differ by more than 20 %.
 * @see solve-ph.ts, solved for the amount.
 * @example acidDose(drink, 3.5, 'citricAnhydrous')
 */
export function acidDose(drink: DrinkAcidity, targetPh: number, acid: AcidKind, strengthPercent = 100): AcidDose {
  const target = within(targetPh, 'A target pH', 1, 8);
  const base = drinkSolution(drink);
  const { dissociates } = entryOf(acidKinds, acid, 'An acid');
  const unit = { acidsMolPerL: { [dissociates]: 1 }, strongIonEqPerL: 0, tempC: drink.tempC };
  const { ph } = solvePh(base);
  if (ph <= target) return { kind: 'none-needed', ph };
  const molPerL = amountAtPh(base, unit, target, MOST_MOL_PER_L);
  if (molPerL === null || molPerL < 0) return { kind: 'never' };
  return { kind: 'add', molPerL, gPerL: acidMassG(acid, molPerL, 1, strengthPercent) };
}
