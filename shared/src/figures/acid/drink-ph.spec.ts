import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { co2MolPerLFromVolumes } from '../gas/co2-volumes.js';
import { hco3FromCaCo3 } from '../water/alkalinity.js';
import { pureWater } from '../water/ions.js';
import { saltedWater } from '../water/salts.js';
import { acidDose } from './acid-dose.js';
import { acidKinds, acidMolPerL, type AcidKind } from './acids.js';
import { drinkPh, drinkPhBand } from './drink-ph.js';
import type { DrinkAcidity } from './drink-acidity.js';
import { lotMultiplier } from './lot-multiplier.js';
import { titratableAcidityGPerL, titratedAcidityGPerL } from './titratable-acidity.js';

const water = saltedWater(20, [
  { salt: 'calciumChlorideDihydrate', massG: 6 },
  { salt: 'gypsum', massG: 2.4 },
]);
const acid = { citric: acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) };
const teaMeqPerL = 5 * 0.22 * 0.85;
const drink: DrinkAcidity = { water, acidsMolPerL: acid, leafBaseMeqPerL: teaMeqPerL + 3 * 0.64, tempC: 25 };
/** 100 mg/L as CaCO3, its strong ions as sodium and chloride that give 0.0040 of ionic strength. */
const hard = { ...pureWater, hco3: hco3FromCaCo3(100), na: 22.99 * 4.999, cl: 35.45 * 3.001 };

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

  it('refuses water whose charges cannot be right', () => {
    expect(() => drinkPh({ ...drink, water: { ...water, cl: 0 } })).toThrow(/Check the water report/);
  });
});

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
      targetPh: fc.double({ min: 2.5, max: 6, noNaN: true }),
      leafBaseMeqPerL: fc.double({ min: 0, max: 20, noNaN: true }),
      alkalinity: fc.double({ min: 0, max: 400, noNaN: true }),
      tempC: fc.double({ min: 0, max: 60, noNaN: true }),
    });
    fc.assert(
      fc.property(cases, ({ kind, targetPh, leafBaseMeqPerL, alkalinity, tempC }) => {
        const hco3 = hco3FromCaCo3(alkalinity);
        const liquid = {
          water: { ...pureWater, hco3, na: (hco3 / 61.016) * 22.99 },
          acidsMolPerL: {},
          leafBaseMeqPerL,
          tempC,
        };
        const dose = acidDose(liquid, targetPh, kind);
        if (dose.kind !== 'add') return;
        const { dissociates } = acidKinds[kind];
        expect(drinkPh({ ...liquid, acidsMolPerL: { [dissociates]: dose.molPerL } }).ph).toBeCloseTo(targetPh, 6);
      }),
    );
  });
});

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
