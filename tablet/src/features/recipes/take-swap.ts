import type { Ingredient } from '@steepfall/shared/contracts';
import type { Swap } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { newId } from '#lib/ids.ts';
import { fromStores } from './from-stores.ts';

/** The recipe with a part of one addition, or all of it, replaced by what the stores have; conditions stay. */
export function withSwap(document: RecipeDocument, swap: Swap, ingredient: Ingredient, nowMs: number): RecipeDocument {
  return {
    ...document,
    additions: document.additions.flatMap((addition) => {
      if (addition.id !== swap.additionId) return [addition];
      const stand = fromStores({ ...addition, id: newId(), massG: swap.takeG }, ingredient, nowMs);
      return swap.keepG > 0 ? [{ ...addition, massG: swap.keepG }, stand] : [stand];
    }),
  };
}
