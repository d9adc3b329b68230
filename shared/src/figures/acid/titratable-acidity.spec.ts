import { describe, expect, it } from 'vitest';
import { pureWater } from '../water/ions.js';
import { saltedWater } from '../water/salts.js';
import { acidMolPerL } from './acids.js';
import type { DrinkAcidity } from './drink-acidity.js';
import { titratableAcidityGPerL, titratedAcidityGPerL } from './titratable-acidity.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const teaMeqPerL = 5 * 0.22 * 0.85;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL: teaMeqPerL + 3 * 0.64, tempC: 25 };

describe('titratable acidity', () => {
  it('equivalents: 6.0 mL of 0.100 N in 50 mL are 0.768 g/L', () => {
    expect(Math.abs(titratedAcidityGPerL({ baseMl: 6, normality: 0.1, sampleMl: 50 }) - 0.768)).toBeLessThan(0.002);
  });

  it('mass action: 99.5 % of three protons by pH 8.2; the weak acids of the leaf give back what its base took', () => {
    const bare = titratableAcidityGPerL({ ...drink, leafBaseMeqPerL: 0 }) ?? 0;
    expect(bare / 0.35).toBeCloseTo(0.995, 2);
    expect(Math.abs((titratableAcidityGPerL(drink) ?? 0) - bare)).toBeLessThan(0.015);
    const empty = { ...drink, water: pureWater, acidsMolPerL: {}, leafBaseMeqPerL: 0 };
    expect(titratableAcidityGPerL(empty)).toBeCloseTo(0, 3);
  });

  it('refuses an end point below 7', () => {
    expect(() => titratableAcidityGPerL(drink, 4)).toThrow(RangeError);
    expect(() => titratedAcidityGPerL({ baseMl: 6, normality: 0.1, sampleMl: 0 })).toThrow(RangeError);
  });
});
