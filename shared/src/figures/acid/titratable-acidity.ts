import { notNegative, positive, within } from '../numeric/guard.js';
import { drinkSolution, type DrinkAcidity } from './drink-acidity.js';
import { amountAtPh } from './linear-at-ph.js';

/** g of anhydrous citric acid per equivalent. */
const CITRIC_G_PER_EQ = 64.04;
/** Usual end point (from memory). */
const END_PH = 8.2;
const MOST_EQ_PER_L = 6;

/**
 * Titratable acidity as anhydrous citric acid, g/L, from a titration to pH 8.2. Degas first: CO2 titrates.
 *
 * @param titration base used 0 mL or more, its normality and the sample above 0.
 * @throws RangeError outside these ranges.
 * @see equivalents of base times 64.04 g.
 * @example titratedAcidityGPerL({ baseMl: 6, normality: 0.1, sampleMl: 50 }) // 0.768
 */
export function titratedAcidityGPerL(titration: { baseMl: number; normality: number; sampleMl: number }): number {
  const equivalents =
    notNegative(titration.baseMl, 'The base used', 'mL') * positive(titration.normality, 'A normality');
  return (equivalents * CITRIC_G_PER_EQ) / positive(titration.sampleMl, 'A sample', 'mL');
}

/**
 * What a titration of a degassed drink to an end point would find, g/L as anhydrous citric acid; 0 when it is there already.
 * Sourness follows this more than pH. The leaf raises the pH and hardly moves this: its base is the salt of weak acids, which
 * titrate. Phenols of tea and phosphate near pH 8 are left out: the true value is a little higher.
 *
 * @param endPh 7 to 9; 8.2 unless told.
 * @throws RangeError when a number is out of range.
 * @see solve-ph.ts, solved for the strong base.
 */
export function titratableAcidityGPerL(drink: DrinkAcidity, endPh = END_PH): number | null {
  // It takes minutes: no air comes into it.
  const base = { ...drinkSolution({ ...drink, co2MolPerL: 0, tempC: 25 }), gasCo2MolPerL: 0 };
  const strongBase = { acidsMolPerL: {}, strongIonEqPerL: 1, tempC: 25 };
  const eqPerL = amountAtPh(base, strongBase, within(endPh, 'An end point', 7, 9), MOST_EQ_PER_L);
  return eqPerL === null ? null : Math.max(0, eqPerL) * CITRIC_G_PER_EQ;
}
