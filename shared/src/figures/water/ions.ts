import { notNegative } from '../numeric/guard.js';

/** The ions that are followed. Alkalinity is kept as the bicarbonate that would give it. */
export type Ion = 'ca' | 'mg' | 'na' | 'k' | 'cl' | 'so4' | 'hco3';
export const ions: readonly Ion[] = ['ca', 'mg', 'na', 'k', 'cl', 'so4', 'hco3'];

/** Concentration of each ion, mg per litre at 20 °C ("ppm" in this trade). */
export type IonsMgPerL = Readonly<Record<Ion, number>>;

/** g/mol (IUPAC 2021 abridged atomic weights, from memory). */
export const ionMolarMass: Readonly<Record<Ion | 'oh', number>> = {
  ca: 40.078,
  mg: 24.305,
  na: 22.99,
  k: 39.098,
  cl: 35.45,
  so4: 96.056,
  hco3: 61.016,
  oh: 17.007,
};

/** Charge of each ion, in units of the elementary charge. */
export const ionCharge: Readonly<Record<Ion, number>> = { ca: 2, mg: 2, na: 1, k: 1, cl: -1, so4: -2, hco3: -1 };

/** Water without a single ion. Real reverse-osmosis water holds 5 to 20 mg/L (from memory): enter a report when there is one. */
export const pureWater: IonsMgPerL = { ca: 0, mg: 0, na: 0, k: 0, cl: 0, so4: 0, hco3: 0 };

/** @throws RangeError when an ion is negative or missing. */
export function checkedIons(ionsMgPerL: IonsMgPerL): IonsMgPerL {
  for (const ion of ions) notNegative(ionsMgPerL[ion], `The ${ion} of the water`, 'mg/L');
  return ionsMgPerL;
}

/**
 * Charge that an ion carries, milliequivalents per litre, always positive.
 *
 * @throws RangeError when an ion is negative or missing.
 */
export function ionMeqPerL(ionsMgPerL: IonsMgPerL, ion: Ion): number {
  return (
    (notNegative(ionsMgPerL[ion], `The ${ion} of the water`, 'mg/L') * Math.abs(ionCharge[ion])) / ionMolarMass[ion]
  );
}
