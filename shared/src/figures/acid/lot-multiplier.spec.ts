import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { saltedWater } from '../water/salts.js';
import { acidMolPerL } from './acids.js';
import { drinkPh } from './drink-ph.js';
import type { DrinkAcidity } from './drink-acidity.js';
import { lotMultiplier } from './lot-multiplier.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const teaMeqPerL = 5 * 0.22 * 0.85;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL: teaMeqPerL + 3 * 0.64, tempC: 25 };

describe('lotMultiplier', () => {
  it.each([
    [3.55, 0.63],
    [3.85, 1.13],
  ])('Goldberg 2002 and Davies, computed: a measured %s means %s times the leaf', (measuredPh, times) => {
    expect(Math.abs((lotMultiplier(drink, measuredPh) ?? 0) - times)).toBeLessThan(0.015);
  });

  it('comes back to the pH it came from', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 5, noNaN: true }), (times) => {
        const { ph } = drinkPh({ ...drink, leafBaseMeqPerL: times * drink.leafBaseMeqPerL });
        expect(lotMultiplier(drink, ph)).toBeCloseTo(times, 6);
      }),
    );
  });

  it('has none for a pH that leaf cannot explain', () => {
    expect(lotMultiplier(drink, 2.5)).toBeNull();
    expect(lotMultiplier(drink, 9)).toBeNull();
    expect(lotMultiplier({ ...drink, leafBaseMeqPerL: 0 }, 3.5)).toBeNull();
  });
});
