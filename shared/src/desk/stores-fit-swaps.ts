import { acidKinds, alphaNowPercent, saltKinds } from '../figures/index.js';
import type { Addition } from '../sheets/index.js';
import { weighableG } from './rounding.js';
import { firstToUse, freeG, ingredientFreeG, isSameStuff, type StockedIngredient } from './stocked.js';

/** An ingredient that can stand in for the part of an addition that the stores are short of. */
export interface Swap {
  additionId: string;
  /** What is short. */
  name: string;
  /** What stays of it, g. */
  keepG: number;
  ingredientId: string;
  /** What stands in. */
  ingredientName: string;
  /** Of what stands in, g. */
  takeG: number;
  /**
   * How the grams were reckoned: `alpha` so that the alpha acids, and with them the bitterness index, stay; `substance` so that the same
   * ions or the same acid come into the water; `mass` gram for gram.
   */
  by: 'alpha' | 'substance' | 'mass';
  /** The same kind of tea and cut, or the same form of hops. */
  isAlike: boolean;
  /** Whether enough of it is free. */
  isEnough: boolean;
}

/** Grams of what stands in per gram of what is short; null when it cannot. */
type Rate = { by: Swap['by']; gPerG: number } | null;

/** Alpha of the lot that would be used first, % today by its storage index, or else as its maker wrote; null when it is not told. */
function alphaOf({ lots }: StockedIngredient): number | null {
  const hops = firstToUse(lots.filter((lot) => freeG(lot) > 0))[0]?.hops;
  if (!hops) return null;
  const { alphaPercent: harvestPercent, storageIndex } = hops;
  return storageIndex === null ? harvestPercent : alphaNowPercent({ harvestPercent, storageIndex }).value;
}

const gramForGram: Rate = { by: 'mass', gPerG: 1 };

/** Hydrates of one salt give the same ions. */
function isHydrateOf(one: keyof typeof saltKinds, other: keyof typeof saltKinds): boolean {
  const kind = saltKinds[one];
  const hydrates: readonly string[] = 'hydrates' in kind ? kind.hydrates : [];
  return one === other || hydrates.includes(other);
}

function rateOf(addition: Addition, candidate: StockedIngredient): Rate {
  const { facts } = candidate;
  if (addition.kind === 'salt' && facts.kind === 'salt') {
    if (!isHydrateOf(addition.salt, facts.salt)) return null;
    const wanted = (addition.assayPercent ?? 100) / saltKinds[addition.salt].molarMass;
    return { by: 'substance', gPerG: wanted / (facts.assayPercent / saltKinds[facts.salt].molarMass) };
  }
  if (addition.kind === 'acid' && facts.kind === 'acid') {
    const [one, other] = [acidKinds[addition.acid], acidKinds[facts.acid]];
    if (one.dissociates !== other.dissociates) return null;
    const wanted = (addition.strengthPercent ?? 100) / one.molarMass;
    return { by: 'substance', gPerG: wanted / (facts.strengthPercent / other.molarMass) };
  }
  if (addition.kind === 'hops' && facts.kind === 'hops') {
    const alphaPercent = alphaOf(candidate);
    return alphaPercent && addition.alphaPercent
      ? { by: 'alpha', gPerG: addition.alphaPercent / alphaPercent }
      : gramForGram;
  }
  return addition.kind === facts.kind ? gramForGram : null;
}

/**
 * What can stand in for the part of an addition that is short, the most alike first: the same kind and cut of tea or form of hops, then
 * what there is enough of. Salts and acids only by another jar of the same substance.
 *
 * @param ingredient that the addition is weighed from.
 * @param neededG of it, for the volume wanted, g.
 * @param resolutionG what the scale shows, g; a tenth of a gram unless told.
 */
export function swapsFor(
  addition: Addition,
  ingredient: StockedIngredient,
  neededG: number,
  stocked: readonly StockedIngredient[],
  resolutionG = 0.1,
): Swap[] {
  const keepG = Math.min(neededG, ingredientFreeG(ingredient));
  return stocked
    .filter(({ id, isRemoved = false }) => id !== ingredient.id && !isRemoved)
    .flatMap((candidate): Swap[] => {
      const rate = rateOf(addition, candidate);
      const free = ingredientFreeG(candidate);
      if (!rate || free <= 0) return [];
      const takeG = weighableG(neededG - keepG, 1, rate.gPerG, resolutionG);
      return [
        {
          additionId: addition.id,
          name: ingredient.facts.name,
          keepG,
          ingredientId: candidate.id,
          ingredientName: candidate.facts.name,
          takeG,
          by: rate.by,
          isAlike: isSameStuff(addition, candidate.facts),
          isEnough: free >= takeG,
        },
      ];
    })
    .sort((a, b) => Number(b.isAlike) - Number(a.isAlike) || Number(b.isEnough) - Number(a.isEnough));
}
