import { band, type Band } from '../bands/band.js';
import { monteCarlo } from '../bands/monte-carlo.js';
import { curveBetween } from '../curve/temperature-curve.js';
import { alphaSolubilityAt60, alphaSolubilityMgPerL } from '../hops/alpha-solubility.js';
import {
  bitternessWeight,
  bitternessWord,
  hopBitternessIndex,
  humulinoneExtracted,
  humulinonePercent,
  type BitternessWord,
} from '../hops/bitterness.js';
import { isomerise } from '../hops/isomerisation.js';
import { notNegative, positive, within } from '../numeric/guard.js';
import type { DrinkPlan, HopAddition } from './drink-plan.js';

/** Below 80 °C the rate is extrapolated: 35 % from its energy alone. */
const RATE_SPREAD = 1.35;
/** Humulinones in pellets, low and high over the default: 0.2 and 0.5 over 0.35 (Maye 2015). */
const HUMULINONE_SPREAD = { low: 0.2 / 0.35, high: 0.5 / 0.35 };
const SOLUBILITY_FACTOR = 3;
/** Ends of what is believed of alpha's solubility; held beyond. */
const SOLUBILITY_PH = { from: 2, to: 9 } as const;
const RUNS = 500;

export interface HopFigures {
  /** If all of it were dissolved, mg/L. */
  alphaMgPerL: number;
  isoMgPerL: Band;
  humulinoneMgPerL: Band;
  /** At the serving temperature; the rest is haze and sediment. */
  alphaDissolvedMgPerL: Band;
  /** mg/L iso-equivalent; an index, never a laboratory unit. */
  bitternessIndex: Band;
  word: BitternessWord;
}

/** Hop side of a drink. @param phAtHops while they are in. @param phStill of the drink. @param concentration factor by evaporation. */
export function hopFigures(plan: DrinkPlan, phAtHops: number, phStill: number, concentration: number): HopFigures {
  const [hopPh, stillPh] = [phAtHops, phStill].map((ph) =>
    Math.min(SOLUBILITY_PH.to, Math.max(SOLUBILITY_PH.from, ph)),
  ) as [number, number];
  const liters = positive(plan.waterL, 'A volume of water', 'L');
  const gPerL = (hops: HopAddition) => (notNegative(hops.massG, 'A mass of hops', 'g') / liters) * concentration;
  const alphaOf = (hops: HopAddition) => gPerL(hops) * within(hops.alphaPercent, 'Alpha acids', 0, 30, '%') * 10;
  const alphaMgPerL = plan.hops.reduce((sum, hops) => sum + alphaOf(hops), 0);
  const iso = (solubilityAt60MgPerL: number) =>
    plan.hops.reduce((sum, hops) => {
      const curve = curveBetween(plan.curve, hops.inAtMs, hops.outAtMs);
      // All hops share what the liquid can dissolve; each gets its part of it.
      const share = alphaMgPerL > 0 ? alphaOf(hops) / alphaMgPerL : 0;
      if (share === 0) return sum;
      const contact = { alphaMgPerL: alphaOf(hops), ph: hopPh, solubilityAt60MgPerL: solubilityAt60MgPerL * share };
      return sum + isomerise(curve, contact).isoMgPerL;
    }, 0);
  const isoMgPerL = band(
    iso(alphaSolubilityAt60.low) / RATE_SPREAD,
    iso(alphaSolubilityAt60.value),
    iso(alphaSolubilityAt60.high) * RATE_SPREAD,
    'judged',
  );
  const pool = plan.hops.reduce((sum, hops) => sum + gPerL(hops) * humulinonePercent(hops.storageIndex) * 10, 0);
  const soluble = alphaSolubilityMgPerL(plan.gas.tempC, stillPh);
  const dissolved = (factor: number) => Math.min(alphaMgPerL, soluble * factor);
  const alphaDissolvedMgPerL = band(
    dissolved(1 / SOLUBILITY_FACTOR),
    dissolved(1),
    dissolved(SOLUBILITY_FACTOR),
    'judged',
  );
  const humulinone = pool * humulinoneExtracted.value;
  const point = hopBitternessIndex({
    isoMgPerL: isoMgPerL.value,
    humulinoneMgPerL: humulinone,
    huluponeMgPerL: 0,
    alphaDissolvedMgPerL: alphaDissolvedMgPerL.value,
  });
  const unsure = {
    content: { kind: 'even', ...HUMULINONE_SPREAD, grade: 'measured' },
    out: { kind: 'even', low: humulinoneExtracted.low, high: humulinoneExtracted.high, grade: 'judged' },
    solubility: { kind: 'factor', value: 1, factor: SOLUBILITY_FACTOR, grade: 'judged' },
  } as const;
  const around = (value: number, figure: (x: Record<keyof typeof unsure, number>) => number): Band => {
    const { low, high, grade } = monteCarlo(unsure, figure, { runs: RUNS });
    return band(Math.min(low, value), value, Math.max(high, value), grade);
  };
  const humulinoneMgPerL = around(humulinone, ({ content, out }) => pool * content * out);
  const bitternessIndex = around(
    point,
    ({ content, out, solubility }) =>
      isoMgPerL.value * solubility +
      bitternessWeight.humulinone * pool * content * out +
      bitternessWeight.alpha * dissolved(solubility),
  );
  return {
    alphaMgPerL,
    isoMgPerL,
    humulinoneMgPerL,
    alphaDissolvedMgPerL,
    bitternessIndex,
    word: bitternessWord(point),
  };
}
