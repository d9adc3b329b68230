import { daviesActivity, debyeHuckelA } from '../water/activity.js';
import { notNegative, within } from '../numeric/guard.js';
import { acidPkAt, waterPk, type Dissociating } from './dissociation.js';
import { bindingMetals, complexedCharge, type BindingMetal, type CitrateMetals } from './metal-citrate.js';

/** A base brought by leaf: mol/L of sites, 0 to 2, of one pK, -5 to 20. */
export interface BaseSite {
  molPerL: number;
  pK: number;
}

/** What decides the pH of a liquid. Neutral salts bring only ionic strength; bicarbonate water brings `strongIonEqPerL`. */
export interface AcidSolution {
  /** Totals of each acid, mol/L, 0 to 2; carbonic is for CO2 that is shut in, bicarbonate and all. */
  acidsMolPerL: Partial<Record<Dissociating, number>>;
  /** Na + K + 2 Ca + 2 Mg - Cl - 2 SO4, eq/L, -2 to 2. */
  strongIonEqPerL: number;
  /** mol/L; it takes up a little acid below pH 3. */
  sulfateMolPerL?: number;
  /** Share of the strong ions in the ionic strength, mol/L; half of `strongIonEqPerL` unless told. */
  strongIonicStrength?: number;
  sites?: readonly BaseSite[];
  /** CO2 that the gas over the liquid keeps dissolved, air's or a keg's, 0 to 2 mol/L: bicarbonate comes on top of it. */
  gasCo2MolPerL?: number;
  /** Metals whose complexes with citrate are counted, 0 to 2 mol/L each; left out unless told. They are strong ions as well. */
  citrateMetals?: CitrateMetals;
  /** °C, 0 to 77. */
  tempC: number;
  /** False leaves activities out, for teaching: everything at zero ionic strength. */
  activity?: boolean;
}

/** One acid ready to be summed: constants multiplied up, `betas[i]` for charge -i. */
interface Ladder {
  molPerL: number;
  betas: readonly number[];
  /** That hold the ions of this acid; most acids have none. */
  metals: readonly BindingMetal[];
}

export interface PreparedSolution {
  ladders: readonly Ladder[];
  strongIonEqPerL: number;
  sulfateMolPerL: number;
  strongIonicStrength: number;
  hydrogenSulfateK: number;
  /** Bicarbonate and carbonate under the gas, times the activity of hydrogen once and twice. */
  bicarbonateK: number;
  carbonateK: number;
  waterK: number;
  /** Davies constant; null leaves activities out. */
  activityA: number | null;
}

const MAX_MOL_PER_L = 2;

function ladder(molPerL: number, pKs: readonly number[]): Ladder {
  const betas = [1];
  for (const pK of pKs) betas.push((betas.at(-1) ?? 1) * 10 ** -pK);
  return { molPerL, betas, metals: [] };
}

/** @throws RangeError when a metal is out of range. */
function held(citric: Ladder, metals: CitrateMetals): Ladder {
  const calciumMolPerL = within(metals.calciumMolPerL, 'The calcium of the drink', 0, MAX_MOL_PER_L, 'mol/L');
  const magnesiumMolPerL = within(metals.magnesiumMolPerL, 'The magnesium of the drink', 0, MAX_MOL_PER_L, 'mol/L');
  return { ...citric, metals: bindingMetals({ calciumMolPerL, magnesiumMolPerL }, citric.betas[3] ?? 0) };
}

/** @throws RangeError when a total or the temperature is out of range. */
export function prepared(solution: AcidSolution): PreparedSolution {
  const { tempC } = solution;
  const strongIonEqPerL = within(
    solution.strongIonEqPerL,
    'A strong-ion difference',
    -MAX_MOL_PER_L,
    MAX_MOL_PER_L,
    'eq/L',
  );
  const ladders: Ladder[] = [];
  for (const [acid, molPerL] of Object.entries(solution.acidsMolPerL) as [Dissociating, number][]) {
    within(molPerL, `The ${acid} of the drink`, 0, MAX_MOL_PER_L, 'mol/L');
    if (molPerL === 0) continue;
    const own = ladder(molPerL, acidPkAt(acid, tempC));
    ladders.push(acid === 'citric' && solution.citrateMetals ? held(own, solution.citrateMetals) : own);
  }
  for (const { molPerL, pK } of solution.sites ?? []) {
    ladders.push(ladder(within(molPerL, 'A base of leaf', 0, MAX_MOL_PER_L, 'mol/L'), [within(pK, 'A pK', -5, 20)]));
  }
  const gasCo2 = within(solution.gasCo2MolPerL ?? 0, 'The CO2 of the drink', 0, MAX_MOL_PER_L, 'mol/L');
  const [carbonic1 = 0, carbonic2 = 0] = acidPkAt('carbonic', tempC);
  return {
    ladders,
    strongIonEqPerL,
    sulfateMolPerL: within(solution.sulfateMolPerL ?? 0, 'The sulfate of the drink', 0, MAX_MOL_PER_L, 'mol/L'),
    strongIonicStrength: notNegative(
      solution.strongIonicStrength ?? Math.abs(strongIonEqPerL) / 2,
      'An ionic strength',
      'mol/L',
    ),
    hydrogenSulfateK: 10 ** -(acidPkAt('hydrogenSulfate', tempC)[0] ?? 0),
    bicarbonateK: gasCo2 * 10 ** -carbonic1,
    carbonateK: gasCo2 * 10 ** -(carbonic1 + carbonic2),
    waterK: 10 ** -waterPk(tempC),
    activityA: solution.activity === false ? null : debyeHuckelA(tempC),
  };
}

export interface ChargeAt {
  /** Charges that are left over, eq/L: positive while the pH is too low. */
  leftEqPerL: number;
  /** Strong base that one pH more takes, eq/L; always above 0. */
  bufferEqPerLPerPh: number;
  /** Ionic strength that all ions together have, mol/L. */
  ionicStrength: number;
}

/** Charges of everything at a trial pH, with activities at a trial ionic strength. */
export function chargeAt(solution: PreparedSolution, ph: number, ionicStrength: number): ChargeAt {
  const g = [1, 1, 1, 1];
  if (solution.activityA !== null) {
    for (let charge = 1; charge <= 3; charge += 1)
      g[charge] = daviesActivity(charge, ionicStrength, solution.activityA);
  }
  const g1 = g[1] ?? 1;
  const g2 = g[2] ?? 1;
  const aH = 10 ** -ph;
  const hydrogen = aH / g1;
  const hydroxide = solution.waterK / (aH * g1);
  const bicarbonate = solution.bicarbonateK / (aH * g1);
  const carbonate = solution.carbonateK / (aH * aH * g2);
  const squared = hydrogen + hydroxide + bicarbonate + 4 * carbonate;
  let left = solution.strongIonEqPerL + hydrogen - hydroxide - bicarbonate - 2 * carbonate;
  let buffer = squared;
  let strength = squared + 2 * solution.strongIonicStrength;
  for (const { molPerL, betas, metals } of solution.ladders) {
    let weights = 0;
    let charges = 0;
    let squares = 0;
    let perH = 1;
    for (let i = 0; i < betas.length; i += 1) {
      const weight = ((betas[i] ?? 0) * perH) / (g[i] ?? 1);
      weights += weight;
      charges += i * weight;
      squares += i * i * weight;
      perH /= aH;
    }
    if (metals.length > 0) {
      const bound = complexedCharge(molPerL, { weights, charges, squares }, metals, { aH, g1, g2 });
      left -= bound.chargeEqPerL;
      buffer += bound.slopeEqPerL;
      strength += bound.squaresMolPerL;
      continue;
    }
    const mean = charges / weights;
    left -= molPerL * mean;
    buffer += molPerL * (squares / weights - mean * mean);
    strength += (molPerL * squares) / weights;
  }
  const bound = 1 / (1 + (solution.hydrogenSulfateK * g1) / (aH * g2));
  left += solution.sulfateMolPerL * bound;
  buffer += solution.sulfateMolPerL * bound * (1 - bound);
  strength -= 3 * solution.sulfateMolPerL * bound;
  return { leftEqPerL: left, bufferEqPerLPerPh: Math.LN10 * buffer, ionicStrength: Math.max(0, strength / 2) };
}
