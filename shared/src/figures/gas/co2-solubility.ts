import { KPA_PER_ATM, celsiusToKelvin } from '../../units/index.js';
import { waterDensityKgPerM3 } from '../heat/water-density.js';
import { waterVapourPressureKPa } from '../heat/vapour-pressure.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { within } from '../numeric/guard.js';
import { co2VirialCm3PerMol } from './co2-virial.js';

/** g/mol. */
export const CO2_MOLAR_MASS = 44.0095;
/** Partial molar volume of CO2 in water, cm³/mol (Weiss 1974, from memory). */
const PARTIAL_VOLUME_CM3_PER_MOL = 32.3;

const MAX_TEMP_C = 40;
const MAX_KPA = 1100;

/**
 * Solubility of CO2 in pure water at zero pressure, mol/(kg atm).
 *
 * @param tempC 0 to 40 °C.
 * @throws RangeError outside that range.
 * @see R. F. Weiss, Marine Chemistry 2, 203-215, 1974.
 * @example co2HenryMolPerKgAtm(10) // 0.0537
 */
export function co2HenryMolPerKgAtm(tempC: number): number {
  const k = celsiusToKelvin(within(tempC, 'A drink temperature', 0, MAX_TEMP_C, '°C'));
  return Math.exp(9345.17 / k - 60.2409 + 23.3585 * Math.log(k / 100));
}

/**
 * CO2 that water holds at rest under pure CO2 and its own vapour, mol/kg; 0 when the pressure is only vapour. Hop tea is
 * water here: dissolved tea takes off less than 0.5 %. Published correlations differ by 2 %, and so may the truth.
 *
 * @param tempC 0 to 40 °C.
 * @param absoluteKPa 0 to 1100 kPa absolute.
 * @throws RangeError outside these ranges.
 * @see Weiss 1974: fugacity by the virial coefficient, Henry's law, and the pressure term of the dissolved gas.
 */
export function co2MolPerKg(tempC: number, absoluteKPa: number): number {
  const henry = co2HenryMolPerKgAtm(tempC);
  const pressure = within(absoluteKPa, 'An absolute pressure', 0, MAX_KPA, 'kPa');
  const gasKPa = pressure - waterVapourPressureKPa(tempC);
  if (gasKPa <= 0) return 0;
  // cm³/mol times kPa is mJ/mol.
  const jPerMol = 1000 * GAS_CONSTANT_J_PER_MOL_K * celsiusToKelvin(tempC);
  const fugacityKPa = gasKPa * Math.exp((co2VirialCm3PerMol(tempC) * pressure) / jPerMol);
  const squeeze = Math.exp((-(pressure - KPA_PER_ATM) * PARTIAL_VOLUME_CM3_PER_MOL) / jPerMol);
  return henry * (fugacityKPa / KPA_PER_ATM) * squeeze;
}

/**
 * The same in grams per litre of drink.
 *
 * @throws RangeError as `co2MolPerKg`.
 * @example co2GPerL(4, 200) // 5.67
 */
export function co2GPerL(tempC: number, absoluteKPa: number): number {
  return (CO2_MOLAR_MASS * co2MolPerKg(tempC, absoluteKPa) * waterDensityKgPerM3(tempC)) / 1000;
}
