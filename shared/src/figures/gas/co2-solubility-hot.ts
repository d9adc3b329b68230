import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { within } from '../numeric/guard.js';
import { co2VirialCm3PerMol } from './co2-virial.js';

/** End of the virial coefficient; held above, where it takes off less than 3 % at 1000 kPa. */
const VIRIAL_TO_C = 92;

/**
 * Mole fraction of CO2 in water at rest under a CO2 pressure, the wider correlation: for kegs left in heat, and as a second
 * opinion on Weiss. Up to 4 % away from it in the cold.
 *
 * @param tempC 0 to 160 °C.
 * @param co2KPa partial pressure of CO2, 0 to 1000 kPa.
 * @throws RangeError outside these ranges.
 * @see J. J. Carroll, J. D. Slupsky, A. E. Mather, J. Phys. Chem. Ref. Data 20(6), 1201-1209, 1991: fugacity over Henry's
 * constant; fugacity by the virial coefficient of Weiss 1974.
 * @example co2MoleFractionHot(60, 100) // 0.000300
 */
export function co2MoleFractionHot(tempC: number, co2KPa: number): number {
  const k = celsiusToKelvin(within(tempC, 'A drink temperature', 0, 160, '°C'));
  const pressureKPa = within(co2KPa, 'A CO2 pressure', 0, 1000, 'kPa');
  const henryMPa = Math.exp(-6.8346 + 1.2817e4 / k - 3.7668e6 / k ** 2 + 2.997e8 / k ** 3);
  // cm³/mol times kPa is mJ/mol.
  const bend = (co2VirialCm3PerMol(Math.min(VIRIAL_TO_C, tempC)) * pressureKPa) / (1000 * GAS_CONSTANT_J_PER_MOL_K * k);
  return (pressureKPa / 1000 / henryMPa) * Math.exp(bend);
}
