import { settledStrength } from './settle.js';
import { greatestStrength } from './solve-ph.js';
import { chargeAt, prepared, type AcidSolution } from './solution.js';

const NOTHING: AcidSolution = { acidsMolPerL: {}, strongIonEqPerL: 0, tempC: 25 };

/**
 * How many times `unit` must be added to `base` so that the mixture has a pH: charges add up, so it is one division once the
 * ionic strength has settled.
 *
 * @returns negative when it would have to be taken out; null when `unit` carries no charge at that pH, or more than `atMost`
 * times would be needed.
 */
export function amountAtPh(base: AcidSolution, unit: AcidSolution, ph: number, atMost: number): number | null {
  const start = prepared(base);
  const one = prepared({ ...unit, tempC: base.tempC });
  const water = prepared({ ...NOTHING, tempC: base.tempC });
  const at = (ionicStrength: number) => {
    const bare = chargeAt(water, ph, ionicStrength);
    const added = chargeAt(one, ph, ionicStrength);
    return {
      left: chargeAt(start, ph, ionicStrength),
      perUnit: added.leftEqPerL - bare.leftEqPerL,
      strengthPerUnit: added.ionicStrength - bare.ionicStrength,
    };
  };
  const amount = (ionicStrength: number) => {
    const { left, perUnit } = at(ionicStrength);
    return perUnit === 0 ? Number.NaN : -left.leftEqPerL / perUnit;
  };
  const strengthOf = (ionicStrength: number) => {
    const { left, strengthPerUnit } = at(ionicStrength);
    const times = Math.min(atMost, Math.max(0, amount(ionicStrength)));
    return left.ionicStrength + (Number.isFinite(times) ? times * strengthPerUnit : 0);
  };
  const highest = greatestStrength(start) + atMost * greatestStrength(one);
  const settled = amount(settledStrength(strengthOf, start.strongIonicStrength, highest));
  return Number.isFinite(settled) && settled <= atMost ? settled : null;
}
