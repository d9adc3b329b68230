import type { RecipeDocument } from '../sheets/index.js';
import { measurableAtMostL, weighableG } from './rounding.js';
import { ingredientFreeG, ingredientOf, type StockedIngredient } from './stocked.js';
import { swapsFor, type Swap } from './stores-fit-swaps.js';

export interface StoresFitOptions {
  /** What the scale shows, g. */
  resolutionG?: number;
  /** Drink wanted, L; the volume of the recipe unless told. */
  wantedL?: number;
}

/** An addition for which the volume wanted takes more than what nobody has set aside. */
export interface StoresShort {
  additionId: string;
  name: string;
  ingredientId: string;
  /** For the volume wanted; all additions of this ingredient share what is free. */
  neededG: number;
  freeG: number;
}

export interface StoresFit {
  wantedL: number;
  /** The largest volume that what is free allows, at most the one wanted, L; 0 when something is not there at all. */
  volumeL: number;
  /** What decides it; null when the stores have enough. */
  limitedBy: StoresShort | null;
  /** All that falls short of the volume wanted, the shortest first. */
  short: StoresShort[];
  /** Additions that the stores do not know of: they limit nothing, and need a look. */
  notInStores: { additionId: string; name: string }[];
  /** What can stand in for the part that is short, the most alike first. */
  swaps: Swap[];
}

/** Additions that come from one ingredient. */
interface Need {
  ingredient: StockedIngredient;
  additions: RecipeDocument['additions'];
}

function needsOf({ additions }: RecipeDocument, stocked: readonly StockedIngredient[]): Need[] {
  const needs = new Map<string, Need>();
  for (const addition of additions) {
    const ingredient = ingredientOf(addition, stocked);
    if (!ingredient) continue;
    const need = needs.get(ingredient.id) ?? { ingredient, additions: [] };
    needs.set(ingredient.id, { ...need, additions: [...need.additions, addition] });
  }
  return [...needs.values()];
}

/** Grams that a need takes at a volume, rounded as they would be weighed. */
function neededG(need: Need, fromL: number, toL: number, resolutionG?: number): number {
  return need.additions.reduce(
    (sum, { massG, keeps }) => sum + (keeps === 'mass' ? massG : weighableG(massG, fromL, toL, resolutionG)),
    0,
  );
}

const CRUMB_G = 0.0005;

/** The largest volume for one need, L; 0 when what keeps its grams, or the least that the scale shows, is more than what is free. */
function largestL(need: Need, fromL: number, wantedL: number, resolutionG?: number): number {
  const freeG = ingredientFreeG(need.ingredient);
  const fits = (volumeL: number) => neededG(need, fromL, volumeL, resolutionG) <= freeG + CRUMB_G;
  if (fits(wantedL)) return wantedL;
  const keptG = need.additions.filter(({ keeps }) => keeps === 'mass').reduce((sum, { massG }) => sum + massG, 0);
  const scaledG = need.additions.reduce((sum, { massG }) => sum + massG, 0) - keptG;
  if (scaledG <= 0 || freeG <= keptG) return 0;
  let volumeL = measurableAtMostL(Math.min(wantedL, (fromL * (freeG - keptG)) / scaledG));
  // Several charges that are each rounded up can take a little more than is there: step down until they fit.
  for (let tries = 0; tries < 100 && volumeL > 0; tries += 1) {
    if (fits(volumeL)) return volumeL;
    volumeL = measurableAtMostL(volumeL * 0.99);
  }
  return 0;
}

/**
 * What the stores allow: the largest volume, what decides it, and what can stand in for it. Only what nobody has set aside counts.
 *
 * @param options volume wanted above 0 L, resolution above 0 g.
 * @throws RangeError outside these ranges.
 * @see proportion; grams that stand in are reckoned as told in `Swap.by`.
 */
export function storesFit(
  document: RecipeDocument,
  stocked: readonly StockedIngredient[],
  { resolutionG, wantedL = document.volumeL }: StoresFitOptions = {},
): StoresFit {
  const fromL = document.volumeL;
  const short = needsOf(document, stocked)
    .map((need) => ({
      need,
      volumeL: largestL(need, fromL, wantedL, resolutionG),
      neededG: neededG(need, fromL, wantedL, resolutionG),
    }))
    .filter(({ volumeL }) => volumeL < wantedL)
    .sort((a, b) => a.volumeL - b.volumeL);
  return {
    wantedL,
    volumeL: Math.min(wantedL, ...short.map(({ volumeL }) => volumeL)),
    limitedBy: short[0] ? shortOf(short[0]) : null,
    short: short.map(shortOf),
    notInStores: document.additions
      .filter((addition) => !ingredientOf(addition, stocked))
      .map(({ id, name }) => ({ additionId: id, name })),
    swaps: short.flatMap(({ need, neededG: wantedG }) => {
      const largest = [...need.additions].sort((a, b) => b.massG - a.massG)[0];
      return largest ? swapsFor(largest, need.ingredient, wantedG, stocked, resolutionG) : [];
    }),
  };
}

function shortOf({ need, neededG }: { need: Need; neededG: number }): StoresShort {
  const { ingredient, additions } = need;
  return {
    additionId: additions[0]?.id ?? '',
    name: ingredient.facts.name,
    ingredientId: ingredient.id,
    neededG,
    freeG: ingredientFreeG(ingredient),
  };
}
