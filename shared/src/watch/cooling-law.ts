/**
 * How a kettle's temperature moves: `dT/dt = -a (T - reference)^n`, and its straight-line and exponential special cases.
 * `n` is 1 for a stirred chiller (Newton), about 1.25 for a lidded pot, and 1.4 to 2.4 for an open pot, where evaporation
 * takes most of the heat.
 */

/** Times the closed form of `n = 1` is used instead of the general one, which divides by `n - 1`. */
const NEWTON_WITHIN = 1e-6;

export interface CoolingLaw {
  /** Room or coolant temperature in °C. */
  referenceC: number;
  exponent: number;
}

/**
 * Seconds from `fromC` to `toC` under the law, given the rate of fall now.
 *
 * @param fallCPerS how fast it falls now, in K/s, above 0.
 * @returns null when the target is not between the temperature now and the reference.
 */
export function secondsToFall(fromC: number, toC: number, fallCPerS: number, law: CoolingLaw): number | null {
  const from = fromC - law.referenceC;
  const to = toC - law.referenceC;
  if (!(fallCPerS > 0) || !(from > 0) || !(to > 0) || to > from) return null;
  if (Math.abs(law.exponent - 1) < NEWTON_WITHIN) return (from / fallCPerS) * Math.log(from / to);
  const power = law.exponent - 1;
  return (from / (fallCPerS * power)) * ((from / to) ** power - 1);
}

/**
 * Newton cooling: `T(t) = reference + (from - reference) exp(-k t)`.
 *
 * @param perS k, in 1/s, above 0.
 */
export function newtonAfter(fromC: number, referenceC: number, perS: number, durationS: number): number {
  return referenceC + (fromC - referenceC) * Math.exp(-perS * durationS);
}

/** Seconds from `fromC` to `toC` under Newton cooling with rate constant `perS`; null when it never gets there. */
export function newtonSecondsTo(fromC: number, toC: number, referenceC: number, perS: number): number | null {
  const ratio = (fromC - referenceC) / (toC - referenceC);
  return Number.isFinite(ratio) && ratio >= 1 ? Math.log(ratio) / perS : null;
}

/**
 * How many seconds late a probe of time constant `lagS` shows a crossing under Newton cooling with rate constant `perS`:
 * `-ln(1 - k lag)/k`, which on a straight ramp (`perS` 0) is the lag itself.
 *
 * @returns Infinity when the probe cannot follow (`k lag` is 1 or more).
 */
export function crossingLateByS(lagS: number, perS: number): number {
  const product = lagS * perS;
  if (product >= 1) return Infinity;
  return product < 1e-9 ? lagS : -Math.log1p(-product) / perS;
}
