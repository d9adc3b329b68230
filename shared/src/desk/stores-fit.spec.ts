import { describe, expect, it } from 'vitest';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { buildLot, buildStockedHops, buildStockedTea } from '../testing/stores-builders.js';
import { scaleToVolume } from './scale.js';
import { storesFit } from './stores-fit.js';
import type { StockedIngredient } from './stocked.js';

const document = buildDocument({ additions: [buildTea({ massG: 55 }), buildHops()] });
const sencha = (stockG: number, reservedG = 0) => buildStockedTea([buildLot({ id: 'lot-1', stockG, reservedG })]);
const cascade = buildStockedHops(6.5, [buildLot({ id: 'lot-2' })]);

describe(storesFit, () => {
  it('brews what 34 g of the tea allow, and says so', () => {
    const fit = storesFit(document, [sencha(134, 100), cascade], { resolutionG: 1 });
    expect(fit).toMatchObject({
      wantedL: 20,
      volumeL: 12.3,
      limitedBy: { additionId: 'sencha', name: 'sencha', neededG: 55, freeG: 34 },
      notInStores: [],
    });
    expect(scaleToVolume(document, fit.volumeL, { resolutionG: 1 }).additions[0]?.massG).toBe(34);
  });

  it('has no limit where there is enough, also for more than the recipe', () => {
    expect(storesFit(document, [sencha(500), cascade])).toMatchObject({ volumeL: 20, limitedBy: null, swaps: [] });
    expect(storesFit(document, [sencha(500), cascade], { wantedL: 100 })).toMatchObject({ volumeL: 100 });
  });

  it('counts all charges of one hop together, rounded as they are weighed', () => {
    const charges = buildDocument({
      additions: [buildHops({ massG: 30.4 }), buildHops({ id: 'late', massG: 30.4 })],
    });
    const fit = storesFit(charges, [buildStockedHops(6.5, [buildLot({ id: 'lot', stockG: 31 })])], { resolutionG: 1 });
    const weighed = scaleToVolume(charges, fit.volumeL, { resolutionG: 1 }).additions;
    expect(weighed.reduce((sum, { massG }) => sum + massG, 0)).toBeLessThanOrEqual(31);
    expect(fit.volumeL).toBeGreaterThan(9);
  });

  it('does not brew less of what keeps its grams', () => {
    const kept = buildDocument({ additions: [buildTea({ keeps: 'mass' })] });
    expect(storesFit(kept, [sencha(34)])).toMatchObject({ volumeL: 0, limitedBy: { neededG: 100, freeG: 34 } });
  });

  it('names what the stores do not know of', () => {
    expect(storesFit(document, [cascade])).toMatchObject({
      volumeL: 20,
      notInStores: [{ additionId: 'sencha', name: 'sencha' }],
    });
  });

  it('swaps the part that is short, the most alike first, hops by their alpha', () => {
    const rest = [
      { ...buildStockedTea([buildLot({ id: 'b', stockG: 200 })], 'oolong') },
      buildStockedTea([buildLot({ id: 'g', stockG: 5 })], 'gyokuro'),
      buildStockedTea([buildLot({ id: 'e', stockG: 0 })], 'empty'),
    ].map((one): StockedIngredient =>
      one.facts.kind === 'tea' && one.id === 'oolong' ? { ...one, facts: { ...one.facts, tea: 'oolong' } } : one,
    );
    const saaz = buildStockedHops(3.25, [buildLot({ id: 's' })], 'Saaz');
    const short = buildStockedHops(6.5, [buildLot({ id: 'lot-2', stockG: 40 })]);
    const { swaps } = storesFit(document, [sencha(34), ...rest, short, saaz], { resolutionG: 1 });
    expect(
      swaps.map(({ ingredientName, keepG, takeG, by, isAlike, isEnough }) => [
        ...[ingredientName, keepG, takeG, by, isAlike, isEnough],
      ]),
    ).toEqual([
      ['gyokuro', 34, 21, 'mass', true, false],
      ['oolong', 34, 21, 'mass', false, true],
      ['Saaz', 40, 40, 'alpha', true, true],
    ]);
  });

  it('swaps a salt only for the same ions, with the water in its crystals', () => {
    const salts = buildDocument({
      additions: [
        {
          ...{ id: 'ca', kind: 'salt', name: 'calcium chloride', massG: 10, keeps: 'g-per-l', in: { at: 'fill' } },
          salt: 'calciumChlorideDihydrate',
        },
      ],
    });
    const jar = (
      id: string,
      salt: 'calciumChlorideDihydrate' | 'calciumChlorideAnhydrous' | 'gypsum',
      stockG: number,
    ) => ({
      id,
      facts: { kind: 'salt' as const, name: id, salt, assayPercent: 100, lowStockG: null, allergens: '' },
      lots: [buildLot({ id, stockG })],
    });
    const stocked = [
      jar('flakes', 'calciumChlorideDihydrate', 0),
      jar('dry', 'calciumChlorideAnhydrous', 100),
      jar('gypsum', 'gypsum', 100),
    ];
    // 110.978 over 147.008 g/mol.
    expect(storesFit(salts, stocked).swaps).toMatchObject([{ ingredientName: 'dry', takeG: 7.5, by: 'substance' }]);
  });
});
