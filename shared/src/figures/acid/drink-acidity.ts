import { notNegative } from '../numeric/guard.js';
import { alkalinityMeqPerL } from '../water/alkalinity.js';
import { chargeBalance } from '../water/charge-balance.js';
import { ionMolarMass, type IonsMgPerL } from '../water/ions.js';
import { ionicStrengthMolPerL } from '../water/ionic-strength.js';
import { salinity } from '../water/salinity.js';
import { carbonicLogHenry, type Dissociating } from './dissociation.js';
import { leafBase } from './leaf-base.js';
import type { AcidSolution } from './solution.js';

/** 420 ppm. */
const AIR_CO2_ATM = 420e-6;

/** The drink as the pH sees it. */
export interface DrinkAcidity {
  water: IonsMgPerL;
  acidsMolPerL: Partial<Record<Exclude<Dissociating, 'carbonic' | 'hydrogenSulfate'>, number>>;
  /** Of tea and hops together, meq/L; 0 without. */
  leafBaseMeqPerL: number;
  /** CO2 in the drink, mol/L; 0 for the still, degassed pH that limits are judged on: it then holds what air gives it. */
  co2MolPerL?: number;
  tempC: number;
}

/**
 * What the solver needs for a drink. The alkalinity of the water is its strong-ion difference: the CO2 that acid makes of it
 * leaves the open kettle. What meets no acid stays bicarbonate, in balance with the air, or with `co2MolPerL` in the keg.
 *
 * @throws RangeError when a number is out of range, when the charges of the water differ by more than 20 % (its report
 * must be wrong, and no pH can be computed from it), or when it is salt water.
 */
export function drinkSolution(drink: DrinkAcidity): AcidSolution {
  const balance = chargeBalance(drink.water);
  if (balance.verdict === 'refused') {
    throw new RangeError(
      `The charges of the water must agree within 20 %, got ${Math.round(balance.imbalancePercent)} %. Check the water report.`,
    );
  }
  if (salinity(drink.water) === 'salt') {
    throw new RangeError('The water must be fresh, got salt water of 0.5 mol/L or more. Take another water.');
  }
  const airCo2 = AIR_CO2_ATM * 10 ** carbonicLogHenry(drink.tempC);
  const leaf = leafBase(drink.leafBaseMeqPerL);
  const alkalinityEqPerL = alkalinityMeqPerL(drink.water) / 1000;
  return {
    acidsMolPerL: drink.acidsMolPerL,
    gasCo2MolPerL: Math.max(airCo2, notNegative(drink.co2MolPerL ?? 0, 'The CO2 of the drink', 'mol/L')),
    strongIonEqPerL: alkalinityEqPerL + leaf.strongIonEqPerL,
    sulfateMolPerL: drink.water.so4 / 1000 / ionMolarMass.so4,
    strongIonicStrength: ionicStrengthMolPerL({ ...drink.water, hco3: 0 }) + leaf.strongIonEqPerL / 2,
    sites: leaf.sites,
    tempC: drink.tempC,
  };
}
