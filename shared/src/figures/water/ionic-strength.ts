import { ionCharge, ionMolarMass, ions, type IonsMgPerL } from './ions.js';
import { notNegative } from '../numeric/guard.js';

/**
 * Ionic strength of the water, mol/L: half the sum of charge squared times concentration.
 *
 * @throws RangeError when an ion is negative or not finite.
 * @see G. N. Lewis and M. Randall 1921 (definition).
 */
export function ionicStrengthMolPerL(water: IonsMgPerL): number {
  let sum = 0;
  for (const ion of ions) {
    const molPerL = notNegative(water[ion], `The ${ion} of the water`, 'mg/L') / 1000 / ionMolarMass[ion];
    sum += ionCharge[ion] ** 2 * molPerL;
  }
  return sum / 2;
}
