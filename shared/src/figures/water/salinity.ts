import { dissolvedIonsMgPerL } from './conductivity.js';
import { ionicStrengthMolPerL } from './ionic-strength.js';
import type { IonsMgPerL } from './ions.js';

/** From here on water is called brackish, and tastes of it (from memory). */
const BRACKISH_FROM_MG_PER_L = 1000;
/** End of the Davies formula: no pH is computed beyond. */
const SALT_FROM_MOL_PER_L = 0.5;

export type Salinity = 'fresh' | 'brackish' | 'salt';

/**
 * Whether water is fit for figures, and for a drink: `brackish` tastes of salt whatever is put in; `salt`, as in the sea, is
 * more than the activities hold for.
 *
 * @throws RangeError when an ion is negative or not finite.
 * @see C. W. Davies 1962 for 0.5 mol/L; 1000 mg/L dissolved is common usage (from memory).
 */
export function salinity(water: IonsMgPerL): Salinity {
  if (ionicStrengthMolPerL(water) >= SALT_FROM_MOL_PER_L) return 'salt';
  return dissolvedIonsMgPerL(water) >= BRACKISH_FROM_MG_PER_L ? 'brackish' : 'fresh';
}
