import { acidKinds, acidMolPerL } from '../acid/acids.js';
import { complexedDrinkPh } from '../acid/complexed-ph.js';
import type { DrinkAcidity } from '../acid/drink-acidity.js';
import { drinkPh, drinkPhBand, type LeafBaseEnds } from '../acid/drink-ph.js';
import { juiceMl } from '../acid/lemon-juice.js';
import { herbBaseBand, leafBaseBand, leafBaseExtractedRatio, leafBaseMeqPerG } from '../acid/leaf-base.js';
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

/** A measured pH leaves so much open; a judgement. */
const LEARNED_WITHIN_PH = 0.1;

/** Base of leaf at the ends of what is believed, meq/L. */
interface LeafBaseSum extends LeafBaseEnds {
  meqPerL: number;
  /** Whether a measured pH stands behind part of it. */
  isLearned: boolean;
}

const noBase: LeafBaseSum = { meqPerL: 0, lowMeqPerL: 0, highMeqPerL: 0, isLearned: false };

function plus(one: LeafBaseSum, other: LeafBaseSum): LeafBaseSum {
  return {
    meqPerL: one.meqPerL + other.meqPerL,
    lowMeqPerL: one.lowMeqPerL + other.lowMeqPerL,
    highMeqPerL: one.highMeqPerL + other.highMeqPerL,
    isLearned: one.isLearned || other.isLearned,
  };
}

/** A learned lot is as its multiplier says; any other may be off by its band. */
function baseOf(
  leaf: { massG: number; baseMultiplier?: number; isBaseMeasured?: boolean },
  meqPerGPerL: number,
  spread: { low: number; high: number },
): LeafBaseSum {
  const multiplier = notNegative(leaf.baseMultiplier ?? 1, 'A lot multiplier');
  const meqPerL = notNegative(leaf.massG, 'A mass of leaf', 'g') * meqPerGPerL * multiplier;
  if (leaf.isBaseMeasured) return { meqPerL, lowMeqPerL: meqPerL, highMeqPerL: meqPerL, isLearned: true };
  return { meqPerL, lowMeqPerL: spread.low * meqPerL, highMeqPerL: spread.high * meqPerL, isLearned: false };
}

function phBandOf(drink: Omit<DrinkAcidity, 'leafBaseMeqPerL'>, base: LeafBaseSum): PhBand {
  const { low, value, high } = drinkPhBand({ ...drink, leafBaseMeqPerL: base.meqPerL }, base);
  const least = base.isLearned ? LEARNED_WITHIN_PH : 0;
  return { low: Math.min(low, value - least), value, high: Math.max(high, value + least) };
}

/** Acid side of a drink: pH after each addition, still and carbonated, with the band of the leaf. */
export function acidFigures(plan: DrinkPlan, water: IonsMgPerL): AcidFigures {
  const liters = positive(plan.waterL, 'A volume of water', 'L');
  const acidsMolPerL: DrinkAcidity['acidsMolPerL'] = {};
  let citricMolPerL = 0;
  for (const addition of plan.acids) {
    const molPerL = acidMolPerL(addition, liters);
    const { dissociates } = acidKinds[addition.acid];
    acidsMolPerL[dissociates] = (acidsMolPerL[dissociates] ?? 0) + molPerL;
    if (dissociates === 'citric') citricMolPerL += molPerL;
  }
  const teaBase = plan.teas.reduce((sum, tea) => {
    const out = leafBaseExtractedRatio(steepDoseMin(curveBetween(plan.curve, tea.inAtMs, tea.outAtMs)));
    const spread = tea.kind === 'herbal' ? herbBaseBand : leafBaseBand;
    return plus(sum, baseOf(tea, (leafBaseMeqPerG.tea * out) / liters, spread));
  }, noBase);
  const hopBase = plan.hops.reduce(
    (sum, hops) => plus(sum, baseOf(hops, leafBaseMeqPerG.hops / liters, leafBaseBand)),
    noBase,
  );
  const leafBase = plus(teaBase, hopBase);
  const still = { water, acidsMolPerL, tempC: 25 };
  const gassed = { ...still, co2MolPerL: co2MolPerLFromVolumes(plan.gas.volumes) };
  const all: DrinkAcidity = { ...still, leafBaseMeqPerL: leafBase.meqPerL };
  const phStill = phBandOf(still, leafBase);
  return {
    phAfterAcid: drinkPh({ ...still, leafBaseMeqPerL: 0 }).ph,
    phAfterTea: phBandOf(still, teaBase),
    phStill,
    phStillComplexed: complexedDrinkPh(all).ph,
    phAtHops: plan.acidAfterHops ? drinkPh({ ...all, acidsMolPerL: {} }).ph : phStill.value,
    phCarbonated: phBandOf(gassed, leafBase),
    phCarbonatedServed: phBandOf({ ...gassed, tempC: plan.gas.tempC }, leafBase),
    bufferMeqPerLPerPh: drinkPh(all).bufferEqPerLPerPh * 1000,
    teaBaseMeqPerL: teaBase.meqPerL,
    hopBaseMeqPerL: hopBase.meqPerL,
    titratableGPerL: titratableAcidityGPerL(all),
    lemonJuiceMl: juiceMl(citricMolPerL * liters * acidKinds.citricAnhydrous.molarMass, 'freshLemon'),
  };
}
