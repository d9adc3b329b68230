import { finite, notNegative, positive, within } from '../numeric/guard.js';

/**
 * How strongly the rate of fall grows with the height above the reference, by what takes the heat away. Fitted to computed
 * heat balances of a 9.5 L reference pot (see evaporation.ts and pot-loss.ts); 1 is Newton's law.
 */
export const coolingExponent = {
  stirredChiller: 1,
  liddedPot: 1.25,
  unstirredChiller: 1.4,
  openPotWarm: 1.6,
  openPotHot: 2.1,
  openPotNearBoiling: 2.4,
} as const;

export type CoolingMode = keyof typeof coolingExponent;

export interface PowerLawCooling {
  fromC: number;
  /** Measured room, or coolant inlet, °C. */
  referenceC: number;
  /** Rate of fall at `fromC`, above 0, K/s. */
  fallCPerS: number;
  /** 1 to 4; see `coolingExponent`. */
  exponent: number;
}

function checked({ fromC, referenceC, fallCPerS, exponent }: PowerLawCooling) {
  return {
    referenceC: finite(referenceC, 'A reference temperature', '°C'),
    height: finite(fromC, 'A start temperature', '°C') - referenceC,
    fallCPerS: positive(fallCPerS, 'A rate of fall', 'K/s'),
    power: within(exponent, 'A cooling exponent', 1, 4) - 1,
  };
}

/**
 * Time until a falling temperature reaches a target, s, by dT/dt = -a (T - T_ref)^n with a from the rate now; null when it
 * never does, because the target is not below the start and above the reference. 0 when it is there already.
 *
 * @throws RangeError when an input is not finite, the rate is not above 0, or the exponent is outside 1 to 4.
 * @see closed form of the one-parameter law (computed).
 * @example powerLawDurationS({ fromC: 83, referenceC: 22, fallCPerS: 0.013455, exponent: 2.4 }, 77) // 505 s
 */
export function powerLawDurationS(cooling: PowerLawCooling, toC: number): number | null {
  const { referenceC, height, fallCPerS, power } = checked(cooling);
  const left = finite(toC, 'A target temperature', '°C') - referenceC;
  if (left === height) return 0;
  if (height <= 0 || left <= 0 || left > height) return null;
  const share = height / left;
  return (height / fallCPerS) * (power < 1e-9 ? Math.log(share) : (share ** power - 1) / power);
}

/**
 * Temperature after a time of the same fall, °C.
 *
 * @param durationS 0 or more, s.
 * @throws RangeError as `powerLawDurationS`, or when the start is not above the reference.
 * @example powerLawTempC({ fromC: 83, referenceC: 22, fallCPerS: 0.013455, exponent: 2.4 }, 505.1) // 77.0
 */
export function powerLawTempC(cooling: PowerLawCooling, durationS: number): number {
  const { referenceC, height, fallCPerS, power } = checked(cooling);
  positive(height, 'A start temperature above the reference', 'K');
  const turns = (fallCPerS / height) * notNegative(durationS, 'A duration', 's');
  return referenceC + height * (power < 1e-9 ? Math.exp(-turns) : (1 + power * turns) ** (-1 / power));
}
