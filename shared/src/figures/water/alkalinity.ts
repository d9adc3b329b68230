import { notNegative } from '../numeric/guard.js';
import { ionMeqPerL, ionMolarMass, type IonsMgPerL } from './ions.js';

/** mg of CaCO3 in a milliequivalent. */
const CACO3_MG_PER_MEQ = 50.043;
const HARDNESS_PER_CA = 2.497;
const HARDNESS_PER_MG = 4.118;

/** Alkalinity of the water, meq/L: acid that its bicarbonate takes up. @throws RangeError when negative. */
export function alkalinityMeqPerL(water: IonsMgPerL): number {
  return ionMeqPerL(water, 'hco3');
}

/**
 * Alkalinity as a report prints it, mg/L as CaCO3, from bicarbonate in mg/L (below pH 8.3).
 *
 * @throws RangeError when negative or not finite.
 * @see stoichiometry.
 * @example alkalinityAsCaCo3(122) // 100
 */
export function alkalinityAsCaCo3(hco3MgPerL: number): number {
  return (notNegative(hco3MgPerL, 'Bicarbonate', 'mg/L') / ionMolarMass.hco3) * CACO3_MG_PER_MEQ;
}

/** Bicarbonate, mg/L, from an alkalinity in mg/L as CaCO3. @throws RangeError when negative. @example hco3FromCaCo3(100) // 122 */
export function hco3FromCaCo3(alkalinityAsCaCo3MgPerL: number): number {
  return (notNegative(alkalinityAsCaCo3MgPerL, 'Alkalinity', 'mg/L as CaCO3') / CACO3_MG_PER_MEQ) * ionMolarMass.hco3;
}

/** Total hardness, mg/L as CaCO3. @throws RangeError when negative. */
export function hardnessAsCaCo3(water: IonsMgPerL): number {
  return (
    HARDNESS_PER_CA * notNegative(water.ca, 'Calcium', 'mg/L') +
    HARDNESS_PER_MG * notNegative(water.mg, 'Magnesium', 'mg/L')
  );
}
