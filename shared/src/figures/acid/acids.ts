import { entryOf, notNegative, positive, within } from '../numeric/guard.js';
import type { Dissociating } from './dissociation.js';

/** The acids one can buy. Ask which citric acid it is: the monohydrate is 9 % weaker per gram. */
export const acidKinds = {
  citricAnhydrous: { molarMass: 192.123, dissociates: 'citric' },
  citricMonohydrate: { molarMass: 210.138, dissociates: 'citric' },
  lactic: { molarMass: 90.078, dissociates: 'lactic' },
  phosphoric: { molarMass: 97.994, dissociates: 'phosphoric' },
  malic: { molarMass: 134.087, dissociates: 'malic' },
  tartaric: { molarMass: 150.086, dissociates: 'tartaric' },
  ascorbic: { molarMass: 176.124, dissociates: 'ascorbic' },
} as const satisfies Record<string, { molarMass: number; dissociates: Dissociating }>;

export type AcidKind = keyof typeof acidKinds;

export interface AcidAddition {
  acid: AcidKind;
  massG: number;
  /** Share of the jar that is the acid, % by mass; 100 unless told. Lactic is sold at 80 to 88. */
  strengthPercent?: number;
}

/**
 * Concentration that an acid gives, mol/L.
 *
 * @param volumeL above 0, L.
 * @throws RangeError when a mass is negative, the strength outside 1 to 100 %, or the acid unknown.
 * @see IUPAC 2021 atomic weights (from memory).
 * @example acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) // 0.00182
 */
export function acidMolPerL({ acid, massG, strengthPercent = 100 }: AcidAddition, volumeL: number): number {
  const pureG =
    (notNegative(massG, 'A mass of acid', 'g') * within(strengthPercent, 'An acid strength', 1, 100, '%')) / 100;
  return pureG / entryOf(acidKinds, acid, 'An acid').molarMass / positive(volumeL, 'A volume', 'L');
}

/** Mass to weigh for a concentration, g. @throws RangeError as above. */
export function acidMassG(acid: AcidKind, molPerL: number, volumeL: number, strengthPercent = 100): number {
  const pureG = notNegative(molPerL, 'A concentration', 'mol/L') * entryOf(acidKinds, acid, 'An acid').molarMass;
  return (pureG * positive(volumeL, 'A volume', 'L') * 100) / within(strengthPercent, 'An acid strength', 1, 100, '%');
}
