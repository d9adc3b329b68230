import { addBands, band, herbBaseBand, leafBaseBand, type AcidFigures, type Band } from '../figures/index.js';
import type { RecipeDocument } from '../sheets/index.js';
import { teasOf } from './figure-row.js';

/** What a tenth of pH is worth in base, once a measured pH told it: a sixth; a judgement. */
const learned = { low: 0.83, high: 1.17 };

/** Base that leaf brings, meq/L, with what is believed of it. */
export interface LeafBases {
  tea: Band;
  hops: Band;
  all: Band;
}

type Spread = { low: number; high: number };

function baseBand(meqPerL: number, { low, high }: Spread, isLearned: boolean): Band {
  return band(low * meqPerL, meqPerL, high * meqPerL, isLearned ? 'measured' : 'judged');
}

/** Of herbs nobody knows it so well as of tea: a blend lies between the two by its grams. */
function teaSpread(document: RecipeDocument): Spread {
  const teas = teasOf(document);
  const sumG = (list: typeof teas) => list.reduce((sum, { massG }) => sum + massG, 0);
  const herbs = sumG(teas) > 0 ? sumG(teas.filter(({ tea }) => tea === 'herbal')) / sumG(teas) : 0;
  const between = (leaf: number, herb: number) => leaf + (herb - leaf) * herbs;
  return { low: between(leafBaseBand.low, herbBaseBand.low), high: between(leafBaseBand.high, herbBaseBand.high) };
}

export function leafBasesOf(
  document: RecipeDocument,
  { teaBaseMeqPerL, hopBaseMeqPerL }: Pick<AcidFigures, 'teaBaseMeqPerL' | 'hopBaseMeqPerL'>,
): LeafBases {
  const { teaBaseRatio, hopBaseRatio } = document.assume;
  const isTeaLearned = teaBaseRatio !== undefined;
  const areHopsLearned = hopBaseRatio !== undefined;
  const tea = baseBand(teaBaseMeqPerL, isTeaLearned ? learned : teaSpread(document), isTeaLearned);
  const hops = baseBand(hopBaseMeqPerL, areHopsLearned ? learned : leafBaseBand, areHopsLearned);
  return { tea, hops, all: addBands(tea, hops) };
}
