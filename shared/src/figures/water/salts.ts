import { entryOf, notNegative, positive, within } from '../numeric/guard.js';
import { checkedIons, ionMolarMass, ions, pureWater, type Ion, type IonsMgPerL } from './ions.js';

interface SaltKind {
  /** g/mol (IUPAC 2021 abridged atomic weights, from memory). */
  molarMass: number;
  /** Ions that one formula unit sets free. */
  gives: Partial<Record<Ion | 'oh', number>>;
  /** The same salt with other water in the crystal: ask which one the jar holds. */
  hydrates?: readonly string[];
  /** Above this it stays on the floor of the pot, g/L at 25 °C (from memory). */
  dissolvesToGPerL?: number;
}

export const saltKinds = {
  calciumChlorideAnhydrous: { molarMass: 110.978, gives: { ca: 1, cl: 2 }, hydrates: ['calciumChlorideDihydrate'] },
  calciumChlorideDihydrate: { molarMass: 147.008, gives: { ca: 1, cl: 2 }, hydrates: ['calciumChlorideAnhydrous'] },
  gypsum: { molarMass: 172.164, gives: { ca: 1, so4: 1 }, dissolvesToGPerL: 2.4 },
  magnesiumSulfateHeptahydrate: { molarMass: 246.466, gives: { mg: 1, so4: 1 } },
  magnesiumChlorideHexahydrate: { molarMass: 203.295, gives: { mg: 1, cl: 2 } },
  sodiumChloride: { molarMass: 58.44, gives: { na: 1, cl: 1 } },
  potassiumChloride: { molarMass: 74.548, gives: { k: 1, cl: 1 } },
  sodiumBicarbonate: { molarMass: 84.006, gives: { na: 1, hco3: 1 } },
  potassiumBicarbonate: { molarMass: 100.114, gives: { k: 1, hco3: 1 } },
  /** Counted as dissolved by acid or CO2; plain water takes almost none. */
  calciumCarbonate: { molarMass: 100.086, gives: { ca: 1, hco3: 2 }, dissolvesToGPerL: 0.013 },
  calciumHydroxide: { molarMass: 74.092, gives: { ca: 1, oh: 2 }, dissolvesToGPerL: 1.6 },
} as const satisfies Record<string, SaltKind>;

export type Salt = keyof typeof saltKinds;

function kindOf(salt: Salt): SaltKind {
  return entryOf<Salt, SaltKind>(saltKinds, salt, 'A salt');
}

/**
 * What one gram of a salt in one litre adds of an ion, mg/L.
 *
 * @throws RangeError on an unknown salt.
 * @see stoichiometry with IUPAC 2021 atomic weights.
 * @example saltIonMgPerG('calciumChlorideDihydrate', 'ca') // 272.6
 */
export function saltIonMgPerG(salt: Salt, ion: Ion | 'oh'): number {
  const { gives, molarMass } = kindOf(salt);
  return (1000 * (gives[ion] ?? 0) * ionMolarMass[ion]) / molarMass;
}

/** Acid that one gram of a salt takes up, meq. @throws RangeError on an unknown salt. @example saltAlkalinityMeqPerG('sodiumBicarbonate') // 11.90 */
export function saltAlkalinityMeqPerG(salt: Salt): number {
  const { gives, molarMass } = kindOf(salt);
  return (1000 * ((gives.hco3 ?? 0) + (gives.oh ?? 0))) / molarMass;
}

export interface SaltAddition {
  salt: Salt;
  massG: number;
  /** Share of the jar that is the salt, %; 100 unless told. */
  assayPercent?: number;
}

function pureG({ massG, assayPercent = 100 }: SaltAddition): number {
  return (notNegative(massG, 'A mass of salt', 'g') * within(assayPercent, 'An assay', 1, 100, '%')) / 100;
}

/**
 * Ions of the water after the salts are dissolved in it, mg/L. Hydroxide is counted as the bicarbonate it turns into.
 *
 * @param volumeL above 0, L at 20 °C.
 * @param salts masses 0 g or more, assay 1 to 100 %.
 * @param source the water before; pure water unless told.
 * @throws RangeError outside these ranges.
 * @see stoichiometry.
 */
export function saltedWater(
  volumeL: number,
  salts: readonly SaltAddition[],
  source: IonsMgPerL = pureWater,
): IonsMgPerL {
  const liters = positive(volumeL, 'A volume of water', 'L');
  const sum: Record<Ion, number> = { ...checkedIons(source) };
  for (const addition of salts) {
    const { salt } = addition;
    const gPerL = pureG(addition) / liters;
    for (const ion of ions) sum[ion] += gPerL * saltIonMgPerG(salt, ion);
    sum.hco3 += (gPerL * saltIonMgPerG(salt, 'oh') * ionMolarMass.hco3) / ionMolarMass.oh;
  }
  return sum;
}

/**
 * Salts that will not all dissolve in plain water, with what stays on the floor, g. Chalk and slaked lime dissolve by eating
 * acid: put them in with it, or leave them.
 *
 * @param volumeL above 0, L.
 * @throws RangeError when a mass is negative, an assay outside 1 to 100 %, or the volume not above 0.
 * @see solubilities at 25 °C, from memory.
 */
export function undissolvedSalts(volumeL: number, salts: readonly SaltAddition[]): { salt: Salt; leftG: number }[] {
  const liters = positive(volumeL, 'A volume of water', 'L');
  const totals = new Map<Salt, number>();
  for (const addition of salts) totals.set(addition.salt, (totals.get(addition.salt) ?? 0) + pureG(addition));
  return [...totals].flatMap(([salt, massG]) => {
    const leftG = massG - (kindOf(salt).dissolvesToGPerL ?? Infinity) * liters;
    return leftG > 0 ? [{ salt, leftG }] : [];
  });
}
