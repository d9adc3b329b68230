import type { Ingredient as IngredientAnswer, Lot as LotAnswer } from '@steepfall/shared/contracts';
import type { IngredientFacts } from '@steepfall/shared/stores';
import type { Ingredient } from './models/ingredient.model.js';
import type { Lot } from './models/lot.model.js';
import { inMilligrams, type Balance } from './stock-book.service.js';

/** The columns that hold the facts of an ingredient. */
export function columnsOf({ kind, name, ...facts }: IngredientFacts): Pick<Ingredient, 'kind' | 'name' | 'facts'> {
  return { kind, name, facts };
}

export function factsOf({ kind, name, facts }: Pick<Ingredient, 'kind' | 'name' | 'facts'>): IngredientFacts {
  // Checked together when the row was written.
  return { kind, name, ...facts } as IngredientFacts;
}

export function presentLot(lot: Lot, { stockG, reservedG }: Balance): LotAnswer {
  const { id, ingredientId, code, receivedOn, bestBefore, pricePerKg, note, hops, version } = lot;
  const facts = { code, receivedOn, bestBefore, pricePerKg, note, hops };
  const marks = { hasPhoto: lot.photoId !== null, isRemoved: lot.removedAtMs !== null, version };
  return { id, ingredientId, ...facts, stockG, reservedG, ...marks };
}

/** What was removed still stands among the lots while there is something in it, but it counts no more. */
export function presentIngredient(row: Ingredient, lots: readonly LotAnswer[]): IngredientAnswer {
  const facts = factsOf(row);
  const kept = lots.filter(({ isRemoved }) => !isRemoved);
  const sum = (member: 'stockG' | 'reservedG') => inMilligrams(kept.reduce((total, lot) => total + lot[member], 0));
  const stockG = sum('stockG');
  return {
    id: row.id,
    facts,
    stockG,
    reservedG: sum('reservedG'),
    isLow: facts.lowStockG !== null && stockG < facts.lowStockG,
    isRemoved: row.removedAtMs !== null,
    version: row.version,
    lots: lots.filter(({ isRemoved, stockG: leftG }) => !isRemoved || leftG !== 0),
  };
}
