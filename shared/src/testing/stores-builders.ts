import type { StockedIngredient, StockedLot } from '../desk/index.js';

export function buildLot(overrides: Partial<StockedLot> & Pick<StockedLot, 'id'>): StockedLot {
  return {
    code: overrides.id,
    stockG: 500,
    reservedG: 0,
    pricePerKg: 40,
    bestBefore: null,
    receivedOn: '2026-01-10',
    hops: null,
    ...overrides,
  };
}

const common = { lowStockG: null, allergens: '' };

/** Sencha, whole leaf, as in `buildTea`. */
export function buildStockedTea(lots: StockedLot[], name = 'sencha', id = name): StockedIngredient {
  return { id, facts: { ...common, kind: 'tea', name, tea: 'green', form: 'whole', caffeineMgPerG: null }, lots };
}

/** Pellets, as in `buildHops`; every lot is told the alpha acids. */
export function buildStockedHops(alphaPercent: number, lots: StockedLot[], name = 'Cascade'): StockedIngredient {
  const hops = { alphaPercent, oilMlPer100G: null, harvestedOn: null, storageIndex: null };
  return {
    id: name,
    facts: { ...common, kind: 'hops', name, form: 'pellets' },
    lots: lots.map((lot) => ({ ...lot, hops })),
  };
}
