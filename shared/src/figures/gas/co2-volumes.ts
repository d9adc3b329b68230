import { entryOf, notNegative } from '../numeric/guard.js';
import { CO2_MOLAR_MASS } from './co2-solubility.js';

/**
 * What one mole of CO2 fills at 0 °C and 1 atm, L: the real gas (Messer Group, Properties of carbon dioxide) is used
 * everywhere; the ideal gas only to read numbers of others. They differ by 0.68 %.
 */
const litersPerMole = { real: 22.263, ideal: 22.414 } as const;

export type VolumeConvention = keyof typeof litersPerMole;

/**
 * CO2 in volumes (litres of gas at 0 °C and 1 atm per litre of drink) from g/L.
 *
 * @param gPerL 0 or more, g/L.
 * @param convention `real` unless a number of somebody else is read.
 * @throws RangeError when negative or not finite.
 * @example co2Volumes(5.337) // 2.70
 */
export function co2Volumes(gPerL: number, convention: VolumeConvention = 'real'): number {
  const molar = entryOf(litersPerMole, convention, 'A volume convention');
  return (notNegative(gPerL, 'A CO2 content', 'g/L') / CO2_MOLAR_MASS) * molar;
}

/**
 * CO2 in g/L from volumes.
 *
 * @param volumes 0 or more.
 * @throws RangeError when negative or not finite.
 * @example co2GPerLFromVolumes(2.7) // 5.337
 */
export function co2GPerLFromVolumes(volumes: number, convention: VolumeConvention = 'real'): number {
  const molar = entryOf(litersPerMole, convention, 'A volume convention');
  return (notNegative(volumes, 'A CO2 content in volumes') / molar) * CO2_MOLAR_MASS;
}

/** CO2 in mol/L from volumes, real gas. @example co2MolPerLFromVolumes(2.7) // 0.1213 */
export function co2MolPerLFromVolumes(volumes: number): number {
  return co2GPerLFromVolumes(volumes) / CO2_MOLAR_MASS;
}
