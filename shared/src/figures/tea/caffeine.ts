import { entryOf, notNegative, within } from '../numeric/guard.js';

/**
 * Caffeine in dry leaf, mg/g. White: J. Tea Sci. Res. 14, 19, 2024. Green, oolong, black: from memory. Rooibos and most herbs:
 * Stander et al. 2019; mate, guayusa and yaupon have caffeine and need their own number. Type is a poor predictor.
 */
export const leafCaffeineMgPerG = {
  white: { low: 20, value: 35, high: 50 },
  green: { low: 15, value: 27, high: 40 },
  oolong: { low: 15, value: 27, high: 40 },
  black: { low: 20, value: 30, high: 45 },
  herbal: { low: 0, value: 0, high: 0 },
} as const;

export type CaffeineClass = keyof typeof leafCaffeineMgPerG;

/** Content of a class of leaf, mg/g, with its range. @throws RangeError on an unknown class. */
export function caffeineContent(kind: CaffeineClass): { low: number; value: number; high: number } {
  return entryOf(leafCaffeineMgPerG, kind, 'A caffeine class');
}

/**
 * Caffeine that a leaf brings into the drink, mg/L.
 *
 * @param leaf dose 0 g/L or more, content 0 to 100 mg/g, share extracted 0 to 1 (leafExtraction).
 * @throws RangeError outside these ranges.
 * @see mass balance.
 * @example steepedCaffeineMgPerL({ doseGPerL: 5, contentMgPerG: 35, extractedRatio: 0.797 }) // 139
 */
export function steepedCaffeineMgPerL(leaf: {
  doseGPerL: number;
  contentMgPerG: number;
  extractedRatio: number;
}): number {
  const content = within(leaf.contentMgPerG, 'A caffeine content', 0, 100, 'mg/g');
  return (
    notNegative(leaf.doseGPerL, 'A dose of leaf', 'g/L') *
    content *
    within(leaf.extractedRatio, 'A share extracted', 0, 1)
  );
}

/** Caffeine of one serving, mg; show it rounded to 5 mg, with its band. @throws RangeError when negative. */
export function servingCaffeineMg(mgPerL: number, servingMl: number): number {
  return (notNegative(mgPerL, 'Caffeine', 'mg/L') * notNegative(servingMl, 'A serving', 'mL')) / 1000;
}
