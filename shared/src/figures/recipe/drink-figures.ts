import { checkedCurve } from '../curve/temperature-curve.js';
import { chargeGaugeKPa } from '../gas/charge-pressure.js';
import { co2GPerLFromVolumes } from '../gas/co2-volumes.js';
import { alkalinityMeqPerL, hardnessAsCaCo3 } from '../water/alkalinity.js';
import { chargeBalance, type ChargeBalance } from '../water/charge-balance.js';
import { chlorideSulfate, type ChlorideSulfate } from '../water/chloride-sulfate.js';
import { conductivityUsPerCm } from '../water/conductivity.js';
import type { IonsMgPerL } from '../water/ions.js';
import { ionicStrengthMolPerL } from '../water/ionic-strength.js';
import { salinity, type Salinity } from '../water/salinity.js';
import { saltedWater } from '../water/salts.js';
import { concentrationFactor, drinkYieldL, type DrinkYield, type Losses } from '../yield/drink-yield.js';
import { hazeFlags, type HazeFlag } from '../yield/haze.js';
import { acidFigures, type AcidFigures } from './acid-figures.js';
import type { DrinkPlan } from './drink-plan.js';
import { hopFigures, type HopFigures } from './hop-figures.js';
import { teaFigures, type TeaFigures } from './tea-figures.js';

export interface WaterFigures {
  ions: IonsMgPerL;
  hardnessAsCaCo3: number;
  alkalinityMeqPerL: number;
  ionicStrength: number;
  conductivityUsPerCm: number;
  chlorideSulfate: ChlorideSulfate;
  balance: ChargeBalance;
  /** No pH is computed for `salt`; `brackish` wants another water. */
  salinity: Salinity;
}

export interface DrinkFigures {
  /** Treated water, before heat. */
  water: WaterFigures;
  /** Null when the water report is refused, or the water salt: no pH can be computed from it. */
  acid: AcidFigures | null;
  tea: TeaFigures;
  /** Null with `acid`: dissolved alpha depends on the pH. */
  hops: HopFigures | null;
  yield: DrinkYield;
  haze: readonly HazeFlag[];
  gas: { gPerL: number; gaugeKPa: number | null };
}

/** The keg goes into the cold at once below this, °C. */
const COLD_C = 10;

/**
 * All figures of one drink, from a planned curve at the desk or from the recorded one after the run: the same sums.
 *
 * @param plan see DrinkPlan.
 * @throws RangeError when a number is out of range, with what to do.
 * @see the single figures for models, sources and bands.
 */
export function drinkFigures(plan: DrinkPlan): DrinkFigures {
  checkedCurve(plan.curve);
  const ions = saltedWater(plan.waterL, plan.salts, plan.source);
  const balance = chargeBalance(ions);
  const concentration = concentrationFactor(plan.waterL, plan.evaporatedL);
  const hardness = hardnessAsCaCo3(ions);
  const saltiness = salinity(ions);
  const acid = balance.verdict === 'refused' || saltiness === 'salt' ? null : acidFigures(plan, ions);
  return {
    water: {
      ions,
      hardnessAsCaCo3: hardness,
      alkalinityMeqPerL: alkalinityMeqPerL(ions),
      ionicStrength: ionicStrengthMolPerL(ions),
      conductivityUsPerCm: conductivityUsPerCm(ions).estimate,
      chlorideSulfate: chlorideSulfate(ions, plan.salts),
      balance,
      salinity: saltiness,
    },
    acid,
    tea: teaFigures(plan, concentration),
    hops: acid && hopFigures(plan, acid.phAtHops, acid.phStill.value, concentration),
    yield: drinkYieldL(lossesOf(plan)),
    haze: hazeFlags({
      caMgPerL: ions.ca,
      hardnessAsCaCo3MgPerL: hardness,
      teas: plan.teas.map(({ kind, massG }) => ({ kind, doseGPerL: massG / plan.waterL })),
      hops: plan.hops.length > 0,
      chilledCold: plan.gas.tempC < COLD_C,
    }),
    gas: { gPerL: co2GPerLFromVolumes(plan.gas.volumes), gaugeKPa: chargeGaugeKPa(plan.gas) },
  };
}

/** What of the water does not reach the keg. */
function lossesOf({ waterL, teas, hops, othersG = 0, evaporatedL, deadSpaceL }: DrinkPlan): Losses {
  const sumG = (list: readonly { massG: number }[]) => list.reduce((sum, { massG }) => sum + massG, 0);
  return {
    startL: waterL,
    leafG: sumG(teas) + othersG,
    hopsG: sumG(hops.filter(({ isCones }) => !isCones)),
    conesG: sumG(hops.filter(({ isCones }) => isCones)),
    evaporatedL,
    deadSpaceL,
  };
}
