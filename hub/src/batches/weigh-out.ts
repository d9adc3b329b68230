import type { WeighOutLine } from '@steepfall/shared/contracts';
import type { RecipeDocument } from '@steepfall/shared/sheets';

type LotLine = WeighOutLine['lots'][number] & { additionId: string };

/** What is weighed into which bag, in the order of the recipe, each addition with the lots that it comes from. */
export function weighOutOf({ additions }: RecipeDocument, lots: readonly LotLine[]): WeighOutLine[] {
  return additions.map(({ id, kind, name, massG, bag }) => ({
    additionId: id,
    kind,
    name,
    massG,
    bag: bag ?? null,
    lots: lots.filter(({ additionId }) => additionId === id).map(({ additionId: _, ...lot }) => lot),
  }));
}
