import { describe, expect, it } from 'vitest';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { buildLot, buildStockedHops, buildStockedTea } from '../testing/stores-builders.js';
import { costOf, recipeCost } from './cost.js';
import { proposeReservation } from './reservation.js';

const document = buildDocument({ additions: [buildTea(), buildHops(), buildHops({ id: 'late', massG: 20 })] });
const tea = buildStockedTea([
  buildLot({ id: 'newest', receivedOn: '2026-02-01', pricePerKg: 50 }),
  buildLot({ id: 'oldest', receivedOn: '2025-11-01', stockG: 30, reservedG: 10 }),
  buildLot({ id: 'soon', bestBefore: '2026-04-01', receivedOn: '2026-02-02', stockG: 45.3 }),
  buildLot({ id: 'gone', bestBefore: '2026-03-01', stockG: -20 }),
  buildLot({ id: 'removed', bestBefore: '2026-03-02', isRemoved: true }),
]);
const hops = buildStockedHops(6.5, [buildLot({ id: 'hops', stockG: 70, pricePerKg: null })]);

describe(proposeReservation, () => {
  it('uses first what must be used first, over several lots, and leaves what others set aside', () => {
    expect(proposeReservation(document, [tea, hops]).lines.slice(0, 3)).toEqual([
      { additionId: 'sencha', lotId: 'soon', massG: 45.3 },
      { additionId: 'sencha', lotId: 'oldest', massG: 20 },
      { additionId: 'sencha', lotId: 'newest', massG: 34.7 },
    ]);
  });

  it('shares one lot between two charges, and says what is short', () => {
    const { lines, short } = proposeReservation(document, [hops]);
    expect(lines).toEqual([
      { additionId: 'cascade', lotId: 'hops', massG: 60 },
      { additionId: 'late', lotId: 'hops', massG: 10 },
    ]);
    expect(short).toEqual([
      { additionId: 'sencha', name: 'sencha', neededG: 100, freeG: 0 },
      { additionId: 'late', name: 'Cascade', neededG: 20, freeG: 10 },
    ]);
  });

  it('takes the ingredient that the addition names, else the one of its stuff and name', () => {
    const named = buildDocument({ additions: [buildTea({ name: 'our green', ingredientId: tea.id })] });
    expect(proposeReservation(named, [tea]).short).toEqual([]);
    const other = buildDocument({ additions: [buildTea({ tea: 'black' })] });
    expect(proposeReservation(other, [tea]).lines).toEqual([]);
    expect(proposeReservation(buildDocument({ additions: [buildTea({ name: ' Sencha ' })] }), [tea]).short).toEqual([]);
  });
});

describe(recipeCost, () => {
  it('sums the lots, by batch, litre and serving, and names what has no price', () => {
    const cost = recipeCost({ ...document, assume: { servingMl: 250 } }, [tea, hops]);
    // 65.3 g at 40 and 34.7 g at 50 a kilogram.
    expect(cost.total).toBeCloseTo(2.612 + 1.735, 9);
    expect(cost.perL).toBeCloseTo(cost.total / 20, 9);
    expect(cost.perServing).toBeCloseTo(cost.total / 80, 9);
    expect(cost.unknown).toEqual(['Cascade']);
  });

  it('counts what is short at the newest price', () => {
    const dear = buildStockedTea([buildLot({ id: 'empty', stockG: 0, pricePerKg: 80 })]);
    const only = buildDocument({ additions: [buildTea()] });
    expect(recipeCost(only, [dear])).toMatchObject({ total: 8, unknown: [] });
    expect(recipeCost(only, [])).toMatchObject({ total: 0, unknown: ['sencha'] });
  });
});

describe(costOf, () => {
  it('never counts a line without a lot as free', () => {
    const lines = [
      { name: 'sencha', massG: 100, lots: [{ massG: 60, pricePerKg: 10 }] },
      { name: 'Cascade', massG: 10, lots: [{ massG: 10, pricePerKg: 0 }] },
    ];
    expect(costOf(lines, { volumeL: 0 })).toEqual({ total: 0.6, perL: null, perServing: null, unknown: ['sencha'] });
  });
});
