import type { Ingredient, Lot } from '@steepfall/shared/contracts';
import { newId } from '#lib/ids.ts';

export function buildLot(overrides: Partial<Lot> = {}): Lot {
  return {
    id: newId(),
    ingredientId: newId(),
    code: 'L-1',
    receivedOn: '2026-01-10',
    bestBefore: null,
    pricePerKg: null,
    note: '',
    hops: null,
    stockG: 100,
    reservedG: 0,
    hasPhoto: false,
    isRemoved: false,
    version: 1,
    ...overrides,
  };
}

/** An ingredient whose stock is that of its lots. */
export function buildIngredient(facts: Ingredient['facts'], lots: Lot[] = [], overrides: Partial<Ingredient> = {}) {
  const id = newId();
  const sum = (of: (lot: Lot) => number) => lots.reduce((total, lot) => total + of(lot), 0);
  return {
    id,
    facts,
    stockG: sum(({ stockG }) => stockG),
    reservedG: sum(({ reservedG }) => reservedG),
    isLow: false,
    isRemoved: false,
    version: 1,
    lots: lots.map((lot) => ({ ...lot, ingredientId: id })),
    ...overrides,
  } satisfies Ingredient;
}

export const hopFacts = { kind: 'hops', name: 'Cascade', form: 'pellets', lowStockG: null, allergens: '' } as const;
export const teaFacts = {
  kind: 'tea',
  name: 'sencha',
  tea: 'green',
  form: 'whole',
  caffeineMgPerG: null,
  lowStockG: null,
  allergens: '',
} as const;
