import { within } from '../numeric/guard.js';
import { acidPkAt, type Dissociating } from './dissociation.js';

/**
 * Mean negative charge of an acid at a pH and no ionic strength: what one mole of it takes up of base. For explaining a
 * dose; the dose itself comes from acidDose.
 *
 * @param ph 0 to 14.
 * @param tempC 0 to 77 °C.
 * @throws RangeError outside these ranges.
 * @see mass action.
 * @example meanAcidCharge('citric', 3.5, 25) // 0.750
 */
export function meanAcidCharge(acid: Dissociating, ph: number, tempC = 25): number {
  const aH = 10 ** -within(ph, 'A pH', 0, 14);
  let weights = 1;
  let charges = 0;
  let weight = 1;
  for (const [index, pK] of acidPkAt(acid, tempC).entries()) {
    weight *= 10 ** -pK / aH;
    weights += weight;
    charges += (index + 1) * weight;
  }
  return charges / weights;
}
