import { notNegative, within } from '../numeric/guard.js';

/** Bitterness of each against iso-alpha, by mass. Algazzali and Shellhammer 2016; alpha from memory. Measured in beer. */
export const bitternessWeight = { iso: 1, humulinone: 0.66, hulupone: 0.84, alpha: 0.1 } as const;

/** Humulinones of pellets, % of their mass: 0.2 to 0.5 (J. P. Maye 2015); 0.5 in old hops is a judgement. */
const HUMULINONE_FRESH = 0.35;
const HUMULINONE_OLD = 0.5;
const OLD_FROM_INDEX = 0.4;

/** Default humulinone of pellets, % of their mass; more when the storage index is above 0.4. @throws RangeError outside 0.2 to 2.5. */
export function humulinonePercent(storageIndex?: number): number {
  if (storageIndex === undefined) return HUMULINONE_FRESH;
  return within(storageIndex, 'A hop storage index', 0.2, 2.5) > OLD_FROM_INDEX ? HUMULINONE_OLD : HUMULINONE_FRESH;
}

/** Share that comes out: 0.9 after three days cold (Brauwelt 2017), 0.8 in a quarter of an hour warm is a judgement. */
export const humulinoneExtracted = { low: 0.6, value: 0.8, high: 1 } as const;

/**
 * Humulinones that hops bring into the drink, mg/L.
 *
 * @param hops dose 0 g/L or more, content 0 to 2 % of mass, share extracted 0 to 1.
 * @throws RangeError outside these ranges.
 * @see mass balance.
 * @example humulinoneMgPerL({ doseGPerL: 3, contentPercent: 0.35, extractedRatio: 0.8 }) // 8.4
 */
export function humulinoneMgPerL(hops: { doseGPerL: number; contentPercent: number; extractedRatio: number }): number {
  const content = within(hops.contentPercent, 'A humulinone content', 0, 2, '%') * 10;
  return (
    notNegative(hops.doseGPerL, 'A dose of hops', 'g/L') *
    content *
    within(hops.extractedRatio, 'A share extracted', 0, 1)
  );
}

export interface BitterSubstances {
  isoMgPerL: number;
  humulinoneMgPerL: number;
  huluponeMgPerL: number;
  alphaDissolvedMgPerL: number;
}

/**
 * Hop bitterness index, mg/L iso-equivalent: an index of this tool, never a laboratory unit. The bitterness of tea comes on
 * top and is not on this scale; with nothing sweet in the drink it reads stronger than in beer.
 *
 * @param substances each 0 mg/L or more.
 * @throws RangeError when negative or not finite.
 * @see weights of bitternessWeight.
 * @example hopBitternessIndex({ isoMgPerL: 0, humulinoneMgPerL: 8.4, huluponeMgPerL: 0, alphaDissolvedMgPerL: 6 }) // 6.1
 */
export function hopBitternessIndex(substances: BitterSubstances): number {
  return (
    bitternessWeight.iso * notNegative(substances.isoMgPerL, 'Iso-alpha acid', 'mg/L') +
    bitternessWeight.humulinone * notNegative(substances.humulinoneMgPerL, 'Humulinone', 'mg/L') +
    bitternessWeight.hulupone * notNegative(substances.huluponeMgPerL, 'Hulupone', 'mg/L') +
    bitternessWeight.alpha * notNegative(substances.alphaDissolvedMgPerL, 'Dissolved alpha acid', 'mg/L')
  );
}

export type BitternessWord = 'barely' | 'soft' | 'clear' | 'sharp';

/** What an index tastes like; a judgement. The threshold of iso-alpha in a lager is 7.1 mg/L, 4.5 to 11.2 (Kolpin 2009). @throws RangeError when negative. */
export function bitternessWord(index: number): BitternessWord {
  const b = notNegative(index, 'A bitterness index');
  if (b < 5) return 'barely';
  if (b < 10) return 'soft';
  return b <= 20 ? 'clear' : 'sharp';
}

/**
 * Laboratory bitterness from the absorbance at 275 nm of the acidified iso-octane extract; keep it in its own field. Tea
 * absorbs there too: run the same drink without hops and subtract.
 *
 * @param absorbance 0 or more.
 * @throws RangeError when negative or not finite.
 * @see ASBC Methods of Analysis, Beer-23.
 * @example labBitternessUnits(0.5) // 25
 */
export function labBitternessUnits(absorbance: number): number {
  return 50 * notNegative(absorbance, 'An absorbance');
}
