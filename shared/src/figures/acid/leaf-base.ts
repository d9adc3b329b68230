import { notNegative, within } from '../numeric/guard.js';
import type { BaseSite } from './solution.js';

/** pH that tea or hops alone give pure water. */
const NATIVE_PH = 5.5;
const SITE_PKS = [3.5, 4.5] as const;

/**
 * Base that leaf brings into the drink, meq per g dry: potassium balanced by weak acids. A judgement with a factor of two;
 * tea from the alkalinity of its ash (ISO 3720) times what passes into the brew, hops from how they move the pH of beer.
 * Measure the pH of one batch and the lot multiplier takes the guess out.
 */
export const leafBaseMeqPerG = { tea: 0.22, hops: 0.64 } as const;

/** Multipliers of the band: low, middle, high. */
export const leafBaseBand = { low: 0.6, middle: 1, high: 1.7 } as const;
/** The same for rooibos and herbs, which nobody measured: a factor of three. */
export const herbBaseBand = { low: 1 / 3, middle: 1, high: 3 } as const;

/** Set so that 4 min at 82 °C (4.28 min at 80 °C) bring out 0.85 of the base; a judgement. */
const BASE_PER_STEEP_MIN = -Math.log(1 - 0.85) / 4.28;

/**
 * Share of the tea's base that a steep brings out, 0 to 1.
 *
 * @param steepDoseMin minutes-equivalent at 80 °C (steepDoseMin), 0 or more.
 * @throws RangeError when negative or not finite.
 * @see judgement: first order, through 0.85 at 4 min and 82 °C.
 */
export function leafBaseExtractedRatio(steepDoseMin: number): number {
  return -Math.expm1(-BASE_PER_STEEP_MIN * notNegative(steepDoseMin, 'A steep dose', 'min'));
}

export interface LeafBase {
  strongIonEqPerL: number;
  sites: readonly BaseSite[];
}

/** Share of the sites that is neutralised at a pH. */
function loaded(ph: number): number {
  return SITE_PKS.reduce((sum, pK) => sum + 1 / (1 + 10 ** (pK - ph)), 0) / SITE_PKS.length;
}

/**
 * The base as the solver takes it: a strong ion, and two sites that hold it at the native pH.
 *
 * @param baseMeqPerL 0 to 1000 meq/L.
 * @throws RangeError outside that range.
 * @see judgement: two equal sites of pK 3.5 and 4.5, balanced at pH 5.5.
 */
export function leafBase(baseMeqPerL: number): LeafBase {
  const eqPerL = within(baseMeqPerL, 'A base of leaf', 0, 1000, 'meq/L') / 1000;
  const perSite = eqPerL / (SITE_PKS.length * loaded(NATIVE_PH));
  return { strongIonEqPerL: eqPerL, sites: SITE_PKS.map((pK) => ({ molPerL: perSite, pK })) };
}
