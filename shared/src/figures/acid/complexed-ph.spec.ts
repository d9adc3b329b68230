import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { pureWater } from '../water/ions.js';
import { saltedWater } from '../water/salts.js';
import { acidMolPerL } from './acids.js';
import { complexedDrinkPh } from './complexed-ph.js';
import { drinkPh } from './drink-ph.js';
import type { DrinkAcidity } from './drink-acidity.js';
import { chargeAt, prepared } from './solution.js';
import { solvePh } from './solve-ph.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const leafBaseMeqPerL = 5 * 0.22 * 0.85 + 3 * 0.64;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL, tempC: 25 };

describe('complexes of calcium with citrate', () => {
  it.each([
    ['water, salts and acid', 0, 3.07],
    ['after tea and hops', leafBaseMeqPerL, 3.72],
  ])('USGS minteq.v4, computed: %s', (_name, base, ph) => {
    expect(Math.abs(complexedDrinkPh({ ...drink, leafBaseMeqPerL: base }).ph - ph)).toBeLessThan(0.01);
  });

  it('USGS minteq.v4, computed: they take off 0.015 at pH 3.1 and 0.06 at 3.8', () => {
    const lower = (base: number) =>
      drinkPh({ ...drink, leafBaseMeqPerL: base }).ph - complexedDrinkPh({ ...drink, leafBaseMeqPerL: base }).ph;
    expect(Math.abs(lower(0.1) - 0.015)).toBeLessThan(0.01);
    expect(Math.abs(lower(leafBaseMeqPerL) - 0.06)).toBeLessThan(0.01);
  });

  it('are none without calcium, and none without citrate', () => {
    const soft = { ...drink, water: pureWater };
    expect(complexedDrinkPh(soft).ph).toBeCloseTo(drinkPh(soft).ph, 12);
    const lactic = { ...drink, acidsMolPerL: { lactic: 0.003 } };
    expect(complexedDrinkPh(lactic).ph).toBeCloseTo(drinkPh(lactic).ph, 12);
  });

  it('only lower the pH, leave no charge over, and give the true buffer value, whatever the drink', () => {
    const amount = fc.double({ min: -6, max: -1, noNaN: true }).map((log) => 10 ** log);
    const solutions = fc.record({
      citric: amount,
      citrateMetals: fc.record({ calciumMolPerL: amount, magnesiumMolPerL: amount }),
      strongIonEqPerL: fc.double({ min: -0.01, max: 0.1, noNaN: true }),
      tempC: fc.double({ min: 0, max: 77, noNaN: true }),
    });
    fc.assert(
      fc.property(solutions, ({ citric, citrateMetals, strongIonEqPerL, tempC }) => {
        const strongIonicStrength = 3 * (citrateMetals.calciumMolPerL + citrateMetals.magnesiumMolPerL);
        const bare = { acidsMolPerL: { citric }, strongIonEqPerL, strongIonicStrength, tempC, activity: false };
        const complexed = { ...bare, citrateMetals };
        const answer = solvePh(complexed);
        expect(Math.abs(answer.leftEqPerL)).toBeLessThan(1e-9 * Math.max(1e-3, answer.bufferEqPerLPerPh));
        expect(answer.ph).toBeLessThanOrEqual(solvePh(bare).ph + 1e-9);
        const left = (ph: number) => chargeAt(prepared(complexed), ph, answer.ionicStrength).leftEqPerL;
        const slope = (left(answer.ph - 1e-4) - left(answer.ph + 1e-4)) / 2e-4;
        expect(slope / answer.bufferEqPerLPerPh).toBeCloseTo(1, 4);
        expect(Number.isFinite(solvePh({ ...complexed, activity: true }).ph)).toBe(true);
      }),
      { numRuns: 300 },
    );
  });
});
