import { acidKinds, acidMolPerL } from '../acid/acids.js';
import { complexedDrinkPh } from '../acid/complexed-ph.js';
import type { DrinkAcidity } from '../acid/drink-acidity.js';
import { drinkPh, drinkPhBand } from '../acid/drink-ph.js';
import { juiceMl } from '../acid/lemon-juice.js';
import { leafBaseExtractedRatio, leafBaseMeqPerG } from '../acid/leaf-base.js';
import { titratableAcidityGPerL } from '../acid/titratable-acidity.js';
import { curveBetween } from '../curve/temperature-curve.js';
import { co2MolPerLFromVolumes } from '../gas/co2-volumes.js';
import { positive, notNegative } from '../numeric/guard.js';
import { steepDoseMin } from '../tea/steep-dose.js';
import type { IonsMgPerL } from '../water/ions.js';
import type { DrinkPlan } from './drink-plan.js';

interface PhBand {
  low: number;
  value: number;
  high: number;
}

export interface AcidFigures {
  /** Water, salts and acid, 25 °C. */
  phAfterAcid: number;
  phAfterTea: PhBand;
  /** Still, degassed, 25 °C: what limits are judged on, and what to store. */
  phStill: PhBand;
  /** The same with calcium and magnesium holding citrate (complexedDrinkPh): where the middle would lie in hard water. */
  phStillComplexed: number;
  /** While the hops are in. */
  phAtHops: number;
  phCarbonated: PhBand;
  phCarbonatedServed: PhBand;
  /** Strong base that one pH more takes near the end, meq/L. */
  bufferMeqPerLPerPh: number;
  teaBaseMeqPerL: number;
  hopBaseMeqPerL: number;
  /** As anhydrous citric acid; null beyond the sum. */
  titratableGPerL: number | null;
  /** Fresh lemon juice with as much citric acid, mL. */
  lemonJuiceMl: number;
}

/** Acid side of a drink: pH after each addition, still and carbonated, with the band of the leaf. */
export function acidFigures(plan: DrinkPlan, water: IonsMgPerL): AcidFigures {
  const liters = positive(plan.waterL, 'A volume of water', 'L');
  const acidsMolPerL: DrinkAcidity['acidsMolPerL'] = {};
  let citricMolPerL = 0;
  for (const addition of plan.acids) {
    const { dissociates } = acidKinds[addition.acid];
    const molPerL = acidMolPerL(addition, liters);
    acidsMolPerL[dissociates] = (acidsMolPerL[dissociates] ?? 0) + molPerL;
    if (dissociates === 'citric') citricMolPerL += molPerL;
  }
  const teaBaseMeqPerL = plan.teas.reduce((sum, tea) => {
    const out = leafBaseExtractedRatio(steepDoseMin(curveBetween(plan.curve, tea.inAtMs, tea.outAtMs)));
    return sum + (baseOf(tea, leafBaseMeqPerG.tea) * out) / liters;
  }, 0);
  const hopBaseMeqPerL = plan.hops.reduce((sum, hops) => sum + baseOf(hops, leafBaseMeqPerG.hops) / liters, 0);
  const bare: DrinkAcidity = { water, acidsMolPerL, leafBaseMeqPerL: 0, tempC: 25 };
  const tea = { ...bare, leafBaseMeqPerL: teaBaseMeqPerL };
  const all = { ...bare, leafBaseMeqPerL: teaBaseMeqPerL + hopBaseMeqPerL };
  const gassed = { ...all, co2MolPerL: co2MolPerLFromVolumes(plan.gas.volumes) };
  const phStill = drinkPhBand(all);
  return {
    phAfterAcid: drinkPh(bare).ph,
    phAfterTea: drinkPhBand(tea),
    phStill,
    phStillComplexed: complexedDrinkPh(all).ph,
    phAtHops: plan.acidAfterHops ? drinkPh({ ...all, acidsMolPerL: {} }).ph : phStill.value,
    phCarbonated: drinkPhBand(gassed),
    phCarbonatedServed: drinkPhBand({ ...gassed, tempC: plan.gas.tempC }),
    bufferMeqPerLPerPh: drinkPh(all).bufferEqPerLPerPh * 1000,
    teaBaseMeqPerL,
    hopBaseMeqPerL,
    titratableGPerL: titratableAcidityGPerL(all),
    lemonJuiceMl: juiceMl(citricMolPerL * liters * acidKinds.citricAnhydrous.molarMass, 'freshLemon'),
  };
}

function baseOf(leaf: { massG: number; baseMultiplier?: number }, meqPerG: number): number {
  return (
    notNegative(leaf.massG, 'A mass of leaf', 'g') * meqPerG * notNegative(leaf.baseMultiplier ?? 1, 'A lot multiplier')
  );
}
