import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from './constants.js';
import { finite, positive } from './guard.js';

/**
 * How much faster a reaction or an extraction goes than at a reference temperature.
 *
 * @param tempC above -273.15 °C.
 * @param energyKjPerMol activation energy, any finite number.
 * @param referenceC above -273.15 °C.
 * @throws RangeError outside these ranges.
 * @see S. Arrhenius 1889.
 * @example arrheniusFactor(82, 40.3, 80) // 1.080
 */
export function arrheniusFactor(tempC: number, energyKjPerMol: number, referenceC: number): number {
  const kelvin = positive(celsiusToKelvin(tempC), 'A temperature', 'K');
  const reference = positive(celsiusToKelvin(referenceC), 'A reference temperature', 'K');
  const energy = finite(energyKjPerMol, 'An activation energy', 'kJ/mol') * 1000;
  return Math.exp((-energy / GAS_CONSTANT_J_PER_MOL_K) * (1 / kelvin - 1 / reference));
}

/** Activation energy from the same rate at two temperatures, kJ/mol. @throws RangeError when a rate is not above 0, or the temperatures are equal. */
export function activationEnergyKjPerMol(
  one: { tempC: number; rate: number },
  other: { tempC: number; rate: number },
): number {
  const span = 1 / celsiusToKelvin(one.tempC) - 1 / celsiusToKelvin(other.tempC);
  if (span === 0) throw new RangeError(`Two temperatures must differ, got ${one.tempC} °C twice. Give another pair.`);
  const logs = Math.log(positive(other.rate, 'A rate') / positive(one.rate, 'A rate'));
  return (GAS_CONSTANT_J_PER_MOL_K * logs) / span / 1000;
}
