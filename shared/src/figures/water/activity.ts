import { celsiusToKelvin } from '../../units/index.js';
import { waterDensityKgPerM3 } from '../heat/water-density.js';
import { notNegative, within } from '../numeric/guard.js';

/** The Davies form is meant for less; above it stays where it is. */
const DAVIES_TO_MOL_PER_L = 0.5;
/** Per ångström at 25 °C. */
const SIZE_PER_ANGSTROM = 0.3281;
const MOST_CHARGE = 4;

function squared(charge: number): number {
  return within(charge, 'A charge', -MOST_CHARGE, MOST_CHARGE) ** 2;
}

/**
 * Constant A of the activity formulas, base 10.
 *
 * @param tempC 0 to 100 °C.
 * @throws RangeError outside that range.
 * @see Debye-Hückel; dielectric constant of C. G. Malmberg and A. A. Maryott 1956 (from memory); density Kell 1975.
 * @example debyeHuckelA(25) // 0.511
 */
export function debyeHuckelA(tempC: number): number {
  const t = within(tempC, 'A water temperature', 0, 100, '°C');
  const dielectric = 87.74 - 0.40008 * t + 9.398e-4 * t ** 2 - 1.41e-6 * t ** 3;
  return (1.82483e6 * Math.sqrt(waterDensityKgPerM3(t) / 1000)) / (dielectric * celsiusToKelvin(t)) ** 1.5;
}

/**
 * Activity coefficient of an ion by the Davies formula, solid below 0.1 mol/L; above 0.5 it is held.
 *
 * @param charge of the ion, -4 to 4; 0 gives 1.
 * @param ionicStrength 0 or more, mol/L.
 * @param a constant A (debyeHuckelA), 0 to 2.
 * @throws RangeError outside these ranges.
 * @see C. W. Davies, Ion Association, 1962.
 * @example daviesActivity(1, 0.01, 0.511) // 0.90
 */
export function daviesActivity(charge: number, ionicStrength: number, a: number): number {
  const strength = Math.min(notNegative(ionicStrength, 'An ionic strength', 'mol/L'), DAVIES_TO_MOL_PER_L);
  const root = Math.sqrt(strength);
  const slope = within(a, 'A constant of activity', 0, 2);
  return 10 ** (-slope * squared(charge) * (root / (1 + root) - 0.3 * strength));
}

/**
 * The same by the extended Debye-Hückel formula at 25 °C, with the size of the ion.
 *
 * @param sizeAngstrom 0 or more, Å.
 * @throws RangeError when negative or not finite.
 * @see R. A. Freeze and J. A. Cherry, Groundwater, 1979, appendix IV, after Kielland.
 */
export function extendedDebyeHuckelActivity(charge: number, ionicStrength: number, sizeAngstrom: number): number {
  const root = Math.sqrt(notNegative(ionicStrength, 'An ionic strength', 'mol/L'));
  const size = notNegative(sizeAngstrom, 'An ion size', 'Å');
  return 10 ** ((-debyeHuckelA(25) * squared(charge) * root) / (1 + SIZE_PER_ANGSTROM * size * root));
}
