import type { Addition } from '../sheets/index.js';
import type { IngredientFacts, LotFacts } from '../stores/index.js';

/** What the desk needs to know of a lot. */
export interface StockedLot {
  id: string;
  code: string;
  stockG: number;
  reservedG: number;
  pricePerKg: number | null;
  bestBefore: string | null;
  receivedOn: string;
  hops: LotFacts['hops'];
  isRemoved?: boolean;
}

/** An ingredient of the stores with its lots, as the hub lists it. */
export interface StockedIngredient {
  id: string;
  facts: IngredientFacts;
  lots: readonly StockedLot[];
  isRemoved?: boolean;
}

/** What nobody has set aside, g; never below 0, although a stock can be. */
export function freeG({ stockG, reservedG, isRemoved = false }: StockedLot): number {
  // Sums of decimals such as 0.3 - 0.1 must not leave a crumb that no scale shows.
  return isRemoved ? 0 : Math.max(0, Math.round((stockG - reservedG) * 1000) / 1000);
}

/** What nobody has set aside in all lots together, g. */
export function ingredientFreeG({ lots }: StockedIngredient): number {
  return Math.round(lots.reduce((sum, lot) => sum + freeG(lot), 0) * 1000) / 1000;
}

/** The lots in the order in which to use them: best before first, those without such a date last; then as they were received. */
export function firstToUse(lots: readonly StockedLot[]): StockedLot[] {
  const key = ({ bestBefore, receivedOn, code }: StockedLot) => `${bestBefore ?? '9999-12-31'} ${receivedOn} ${code}`;
  return [...lots].sort((a, b) => (key(a) < key(b) ? -1 : key(a) > key(b) ? 1 : 0));
}

/** The same substance, or leaf of the same kind and cut, or hops of the same form. */
export function isSameStuff(addition: Addition, facts: IngredientFacts): boolean {
  switch (addition.kind) {
    case 'salt':
      return facts.kind === 'salt' && facts.salt === addition.salt;
    case 'acid':
      return facts.kind === 'acid' && facts.acid === addition.acid;
    case 'tea':
      return facts.kind === 'tea' && facts.tea === addition.tea && facts.form === addition.form;
    case 'hops':
      return facts.kind === 'hops' && facts.form === addition.form;
    case 'other':
      return facts.kind === 'other';
  }
}

const plain = (name: string) => name.trim().toLowerCase();

/**
 * The ingredient of the stores that an addition stands for: the one it names; else one of the same stuff and name; a salt or an acid is
 * known by its substance alone, as long as there is only one jar of it.
 */
export function ingredientOf(addition: Addition, stocked: readonly StockedIngredient[]): StockedIngredient | null {
  const kept = stocked.filter(({ isRemoved = false }) => !isRemoved);
  const named = kept.find(({ id, facts }) => id === addition.ingredientId && facts.kind === addition.kind);
  if (named) return named;
  const same = kept.filter(({ facts }) => isSameStuff(addition, facts));
  const byName = same.find(({ facts }) => plain(facts.name) === plain(addition.name));
  if (byName) return byName;
  const isSubstance = addition.kind === 'salt' || addition.kind === 'acid';
  return isSubstance && same.length === 1 ? (same[0] ?? null) : null;
}
