import { notNegative } from '../numeric/guard.js';
import { ionMolarMass, type IonsMgPerL } from './ions.js';
import type { SaltAddition } from './salts.js';

export interface ChlorideSulfate {
  /** mg/L of chloride over mg/L of sulfate. */
  byIonMass: number | null;
  byMole: number | null;
  /** Grams of chloride salts over grams of sulfate salts, as weighed: another number for the same water. */
  bySaltMass: number | null;
}

const chlorideSalts = new Set([
  'calciumChlorideAnhydrous',
  'calciumChlorideDihydrate',
  'magnesiumChlorideHexahydrate',
  'sodiumChloride',
  'potassiumChloride',
]);
const sulfateSalts = new Set(['gypsum', 'magnesiumSulfateHeptahydrate']);

function over(top: number, bottom: number): number | null {
  return bottom > 0 ? top / bottom : null;
}

/**
 * Chloride to sulfate, all three ways people quote it; each null when there is no sulfate. Never show one without its label:
 * with calcium chloride dihydrate and gypsum the ion ratio is 0.864 of the salt ratio.
 *
 * @throws RangeError when an ion or a mass is negative or not finite.
 * @see stoichiometry.
 */
export function chlorideSulfate(water: IonsMgPerL, salts: readonly SaltAddition[] = []): ChlorideSulfate {
  const cl = notNegative(water.cl, 'Chloride', 'mg/L');
  const so4 = notNegative(water.so4, 'Sulfate', 'mg/L');
  const weighed = (kinds: ReadonlySet<string>) =>
    salts.reduce((sum, { salt, massG }) => sum + (kinds.has(salt) ? notNegative(massG, 'A mass of salt', 'g') : 0), 0);
  return {
    byIonMass: over(cl, so4),
    byMole: over(cl / ionMolarMass.cl, so4 / ionMolarMass.so4),
    bySaltMass: over(weighed(chlorideSalts), weighed(sulfateSalts)),
  };
}
