import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hco3FromCaCo3 } from '../water/alkalinity.js';
import { pureWater } from '../water/ions.js';
import { saltedWater } from '../water/salts.js';
import { acidDose } from './acid-dose.js';
import { acidKinds, acidMolPerL, type AcidKind } from './acids.js';
import { drinkPh } from './drink-ph.js';
import type { DrinkAcidity } from './drink-acidity.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const teaMeqPerL = 5 * 0.22 * 0.85;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL: teaMeqPerL + 3 * 0.64, tempC: 25 };
/** 100 mg/L as CaCO3, its strong ions as sodium and chloride that give 0.0040 of ionic strength. */
const hard = { ...pureWater, hco3: hco3FromCaCo3(100), na: 22.99 * 4.999, cl: 35.45 * 3.001 };

describe('acidDose', () => {
  it.each<[AcidKind, number]>([
    ['citricAnhydrous', 3.003],
    ['lactic', 7.27],
    ['phosphoric', 2.44],
  ])('Goldberg 2002 and Davies, computed: %s for pH 3.5 against 100 mg/L as CaCO3 is %s mmol/L', (kind, mmolPerL) => {
    const dose = acidDose({ water: hard, acidsMolPerL: {}, leafBaseMeqPerL: 0, tempC: 25 }, 3.5, kind);
    if (dose.kind !== 'add') throw new Error('must add');
    expect(Math.abs((dose.molPerL * 1000) / mmolPerL - 1)).toBeLessThan(0.01);
    if (kind === 'citricAnhydrous') expect(Math.abs(dose.gPerL / 0.577 - 1)).toBeLessThan(0.01);
  });

  it.each([
    [3.5, 11.0, 1.8],
    [3.8, 6.8, 0.7],
    [4.0, 4.9, 0.4],
  ])(
    'Goldberg 2002 and Davies, computed: pH %s takes %s g of citric in 20 L, %s g without leaf',
    (ph, grams, bareG) => {
      const dosed = (leafBaseMeqPerL: number) => {
        const dose = acidDose({ ...drink, acidsMolPerL: {}, leafBaseMeqPerL }, ph, 'citricAnhydrous');
        return dose.kind === 'add' ? dose.gPerL * 20 : Number.NaN;
      };
      expect(Math.abs(dosed(drink.leafBaseMeqPerL) - grams)).toBeLessThan(0.1);
      expect(Math.abs(dosed(0) - bareG)).toBeLessThan(0.06);
    },
  );

  it('needs none below the target, and never gets there with too weak an acid', () => {
    expect(acidDose(drink, 5, 'lactic')).toMatchObject({ kind: 'none-needed' });
    expect(acidDose({ ...drink, acidsMolPerL: {} }, 1, 'ascorbic')).toEqual({ kind: 'never' });
    expect(() => acidDose(drink, Number.NaN, 'lactic')).toThrow(RangeError);
  });

  it('hits its target, whatever the drink', () => {
    const kinds = Object.keys(acidKinds) as AcidKind[];
    const cases = fc.record({
      kind: fc.constantFrom(...kinds),
      targetPh: fc.double({ min: 1, max: 8, noNaN: true }),
      leafBaseMeqPerL: fc.double({ min: 0, max: 200, noNaN: true }),
      alkalinity: fc.double({ min: 0, max: 2000, noNaN: true }),
      co2MolPerL: fc.constantFrom(0, 0.1348),
      tempC: fc.double({ min: 0, max: 77, noNaN: true }),
    });
    fc.assert(
      fc.property(cases, ({ kind, targetPh, leafBaseMeqPerL, alkalinity, co2MolPerL, tempC }) => {
        const hco3 = hco3FromCaCo3(alkalinity);
        const liquid = {
          water: { ...pureWater, hco3, na: (hco3 / 61.016) * 22.99 },
          acidsMolPerL: {},
          leafBaseMeqPerL,
          co2MolPerL,
          tempC,
        };
        const dose = acidDose(liquid, targetPh, kind);
        const ph = drinkPh(liquid).ph;
        if (dose.kind === 'none-needed') expect(ph).toBeLessThanOrEqual(targetPh);
        else expect(ph).toBeGreaterThan(targetPh);
        if (dose.kind !== 'add') return;
        const { dissociates } = acidKinds[kind];
        expect(drinkPh({ ...liquid, acidsMolPerL: { [dissociates]: dose.molPerL } }).ph).toBeCloseTo(targetPh, 6);
      }),
    );
  });
});
