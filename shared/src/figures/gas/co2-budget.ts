import { celsiusToKelvin } from '../../units/index.js';
import { waterVapourPressureKPa } from '../heat/vapour-pressure.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { notNegative, positive, within } from '../numeric/guard.js';
import { CO2_MOLAR_MASS } from './co2-solubility.js';
import { co2VirialCm3PerMol } from './co2-virial.js';

/**
 * CO2 in a gas space over the drink, or used to push drink out, g; 0 when the pressure is only vapour.
 *
 * @param space volume 0 L or more, temperature 0 to 60 °C, absolute pressure 0 to 1500 kPa.
 * @throws RangeError outside these ranges.
 * @see gas law with the virial coefficient of Weiss 1974.
 * @example co2GasG({ volumeL: 18, tempC: 3, absoluteKPa: 181 }) // 62.9
 */
export function co2GasG(space: { volumeL: number; tempC: number; absoluteKPa: number }): number {
  const tempC = within(space.tempC, 'A gas temperature', 0, 60, '°C');
  const pressureKPa = within(space.absoluteKPa, 'An absolute pressure', 0, 1500, 'kPa');
  const jPerMol = GAS_CONSTANT_J_PER_MOL_K * celsiusToKelvin(tempC);
  const compressibility = 1 + (co2VirialCm3PerMol(tempC) * 1e-3 * pressureKPa) / jPerMol;
  const gasKPa = Math.max(0, pressureKPa - waterVapourPressureKPa(tempC));
  return (gasKPa * notNegative(space.volumeL, 'A volume', 'L') * CO2_MOLAR_MASS) / (compressibility * jPerMol);
}

export interface Co2Budget {
  dissolvedG: number;
  headspaceG: number;
  /** Gas that follows the drink out of the keg until it is empty. */
  pushG: number;
  totalG: number;
}

/**
 * CO2 that one keg takes from charge to the last glass, g.
 *
 * @param keg content 0 g/L or more, volumes 0 L or more, temperature 0 to 60 °C, absolute pressure 0 to 1500 kPa.
 * @throws RangeError outside these ranges.
 * @see co2GasG.
 */
export function co2Budget(keg: {
  gPerL: number;
  drinkL: number;
  headspaceL: number;
  tempC: number;
  absoluteKPa: number;
}): Co2Budget {
  const dissolvedG = notNegative(keg.gPerL, 'A CO2 content', 'g/L') * notNegative(keg.drinkL, 'A volume', 'L');
  const headspaceG = co2GasG({ ...keg, volumeL: keg.headspaceL });
  const pushG = co2GasG({ ...keg, volumeL: keg.drinkL });
  return { dissolvedG, headspaceG, pushG, totalG: dissolvedG + headspaceG + pushG };
}

/**
 * Share of the air that is left in a headspace after filling it with CO2 and venting it, so many times, 0 to 1.
 *
 * @param filledKPa absolute pressure after filling, not below the station's.
 * @param stationKPa local air, above 0 kPa.
 * @param cycles whole number, 0 or more.
 * @throws RangeError outside these ranges.
 * @see each cycle dilutes by the ratio of pressures.
 * @example purgedAirRatio(301.325, 101.325, 3) // 0.038
 */
export function purgedAirRatio(filledKPa: number, stationKPa: number, cycles: number): number {
  const station = positive(stationKPa, 'A station pressure', 'kPa');
  const filled = within(filledKPa, 'A filled pressure', station, 2000, 'kPa');
  if (!Number.isInteger(cycles))
    throw new RangeError(`Purge cycles must be a whole number, got ${cycles}. Count them.`);
  return (station / filled) ** notNegative(cycles, 'Purge cycles');
}
