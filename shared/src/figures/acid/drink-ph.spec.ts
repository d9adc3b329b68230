import { describe, expect, it } from 'vitest';
import { co2MolPerLFromVolumes } from '../gas/co2-volumes.js';
import { hco3FromCaCo3 } from '../water/alkalinity.js';
import { pureWater } from '../water/ions.js';
import { saltedWater } from '../water/salts.js';
import { acidDose } from './acid-dose.js';
import { acidMolPerL } from './acids.js';
import { drinkPh, drinkPhBand } from './drink-ph.js';
import type { DrinkAcidity } from './drink-acidity.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const teaMeqPerL = 5 * 0.22 * 0.85;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL: teaMeqPerL + 3 * 0.64, tempC: 25 };

describe('pH of a drink', () => {
  it.each([
    ['water, salts and acid', { ...drink, leafBaseMeqPerL: 0 }, 3.08],
    ['after the tea', { ...drink, leafBaseMeqPerL: teaMeqPerL }, 3.33],
    ['after the hops', drink, 3.78],
    ['at 60 °C', { ...drink, tempC: 60 }, 3.78],
    ['at 4 °C', { ...drink, tempC: 4 }, 3.81],
    ['at 3 volumes, 25 °C', { ...drink, co2MolPerL: co2MolPerLFromVolumes(3) }, 3.67],
    ['at 3 volumes, 4 °C', { ...drink, co2MolPerL: co2MolPerLFromVolumes(3), tempC: 4 }, 3.72],
  ])('Goldberg 2002 and Davies, computed: %s', (_name, liquid, expected) => {
    expect(Math.abs(drinkPh(liquid).ph - expected)).toBeLessThan(0.01);
  });

  it.each([
    [3.5, 3.45],
    [3.7, 3.61],
    [4.2, 3.93],
  ])('Plummer and Busenberg 1982, computed: a still pH of %s is %s at 3 volumes', (still, gassed) => {
    const dose = acidDose({ ...drink, acidsMolPerL: {} }, still, 'citricAnhydrous');
    if (dose.kind !== 'add') throw new Error('must add');
    const liquid = { ...drink, acidsMolPerL: { citric: dose.molPerL }, co2MolPerL: co2MolPerLFromVolumes(3) };
    expect(Math.abs(drinkPh(liquid).ph - gassed)).toBeLessThan(0.03);
  });

  it('Plummer and Busenberg 1982, computed: without acid 5.5 is 4.2; cold water of 1 meq/L alkalinity at 0.12 mol/L 4.4', () => {
    const bare = { ...drink, acidsMolPerL: {} };
    expect(Math.abs(drinkPh(bare).ph - 5.5)).toBeLessThan(0.1);
    expect(Math.abs(drinkPh({ ...bare, co2MolPerL: co2MolPerLFromVolumes(3) }).ph - 4.2)).toBeLessThan(0.1);
    const hco3 = hco3FromCaCo3(50.043);
    const hard = { ...pureWater, hco3, na: 22.99 };
    expect(
      Math.abs(drinkPh({ ...bare, water: hard, leafBaseMeqPerL: 0, co2MolPerL: 0.12, tempC: 8 }).ph - 4.4),
    ).toBeLessThan(0.05);
  });

  it('judgement (factor of two on the leaf): 3.23 to 3.50 after the tea, 3.53 to 4.09 after the hops', () => {
    const tea = drinkPhBand({ ...drink, leafBaseMeqPerL: teaMeqPerL });
    expect([tea.low, tea.high].map((ph) => Math.round(ph * 100) / 100)).toEqual([3.23, 3.5]);
    const all = drinkPhBand(drink);
    expect(Math.abs(all.low - 3.53)).toBeLessThan(0.015);
    expect(Math.abs(all.high - 4.09)).toBeLessThan(0.015);
  });

  it('Goldberg 2002 and Davies, computed: 5.1 meq/L of leaf base per pH near the end, half as much strong base', () => {
    const more = drinkPh({ ...drink, leafBaseMeqPerL: drink.leafBaseMeqPerL + 0.01 });
    expect(Math.abs(0.01 / (more.ph - drinkPh(drink).ph) - 5.1)).toBeLessThan(0.15);
    expect(drinkPh(drink).bufferEqPerLPerPh * 1000).toBeCloseTo(2.8, 1);
  });

  it('Plummer and Busenberg 1982, computed: alkalinity that meets no acid stays bicarbonate, pH 8.3 in air', () => {
    const hard = { ca: 140, mg: 25, na: 30, k: 3, cl: 60, so4: 80, hco3: 430 };
    const liquid = { ...drink, water: hard, leafBaseMeqPerL: 2 };
    const band = drinkPhBand(liquid);
    expect(Math.abs(band.value - 8.3)).toBeLessThan(0.1);
    expect(band.low).toBeLessThanOrEqual(band.value);
    expect(band.value).toBeLessThanOrEqual(band.high);
    expect(drinkPh({ ...liquid, co2MolPerL: co2MolPerLFromVolumes(3) }).ph).toBeLessThan(5.2);
    const pure = { water: pureWater, acidsMolPerL: {}, leafBaseMeqPerL: 0, tempC: 25 };
    expect(Math.abs(drinkPh(pure).ph - 5.6)).toBeLessThan(0.05);
  });

  it('refuses water whose charges cannot be right', () => {
    expect(() => drinkPh({ ...drink, water: { ...water, cl: 0 } })).toThrow(/Check the water report/);
    expect(() => drinkPh({ ...drink, water: { ...pureWater, na: 11_495, cl: 17_725 } })).toThrow(/another water/);
  });
});
