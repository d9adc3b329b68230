import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chargeBalance } from './charge-balance.js';
import { ionMeqPerL, ions, pureWater, type Ion } from './ions.js';
import { saltAlkalinityMeqPerG, saltIonMgPerG, saltKinds, saltedWater, undissolvedSalts, type Salt } from './salts.js';

const salts = Object.keys(saltKinds) as Salt[];
/** 2.5 US gal of pure water with the usual two salts. */
const small = saltedWater(9.4635, [
  { salt: 'calciumChlorideDihydrate', massG: 2.5 },
  { salt: 'gypsum', massG: 1 },
]);

describe('salts', () => {
  it.each<[Salt, Ion, number, Ion | 'oh', number]>([
    ['calciumChlorideAnhydrous', 'ca', 361.13, 'cl', 638.87],
    ['calciumChlorideDihydrate', 'ca', 272.62, 'cl', 482.29],
    ['gypsum', 'ca', 232.79, 'so4', 557.93],
    ['magnesiumSulfateHeptahydrate', 'mg', 98.61, 'so4', 389.73],
    ['magnesiumChlorideHexahydrate', 'mg', 119.56, 'cl', 348.75],
    ['sodiumChloride', 'na', 393.39, 'cl', 606.61],
    ['potassiumChloride', 'k', 524.47, 'cl', 475.53],
    ['sodiumBicarbonate', 'na', 273.67, 'hco3', 726.33],
    ['potassiumBicarbonate', 'k', 390.53, 'hco3', 609.47],
    ['calciumCarbonate', 'ca', 400.44, 'hco3', 1219.3],
    ['calciumHydroxide', 'ca', 540.92, 'oh', 459.08],
  ])(
    'IUPAC 2021 atomic weights (from memory): a gram of %s gives %s %s and %s %s',
    (salt, cation, mg, anion, other) => {
      expect(Math.abs(saltIonMgPerG(salt, cation) - mg)).toBeLessThan(0.03);
      expect(Math.abs(saltIonMgPerG(salt, anion) - other)).toBeLessThan(0.05);
    },
  );

  it.each<[Salt, number]>([
    ['sodiumBicarbonate', 11.9],
    ['potassiumBicarbonate', 9.99],
    ['calciumCarbonate', 19.98],
    ['calciumHydroxide', 26.99],
    ['gypsum', 0],
  ])('stoichiometry: a gram of %s takes up %s meq of acid', (salt, meq) => {
    expect(saltAlkalinityMeqPerG(salt)).toBeCloseTo(meq, 2);
  });

  it('stoichiometry: 2.5 g and 1.0 g in 2.5 US gal', () => {
    expect(Math.abs(small.ca - 96.62)).toBeLessThan(0.05);
    expect(Math.abs(small.cl - 127.41)).toBeLessThan(0.05);
    expect(Math.abs(small.so4 - 58.96)).toBeLessThan(0.05);
    expect(Math.abs(ionMeqPerL(small, 'ca') - 4.8215)).toBeLessThan(0.001);
    expect(Math.abs(ionMeqPerL(small, 'cl') + ionMeqPerL(small, 'so4') - 4.8215)).toBeLessThan(0.001);
  });

  it('stoichiometry: the same from a jar of anhydrous salt', () => {
    const strong = saltedWater(9.4635, [
      { salt: 'calciumChlorideAnhydrous', massG: 2.5 },
      { salt: 'gypsum', massG: 1 },
    ]);
    expect(Math.abs(strong.ca - 120.0)).toBeLessThan(0.1);
    expect(Math.abs(strong.cl - 168.8)).toBeLessThan(0.1);
  });

  it('balance to nothing, whatever goes in', () => {
    const addition = fc.record({
      salt: fc.constantFrom(...salts),
      massG: fc.oneof(fc.constant(0), fc.double({ min: 0.01, max: 50, noNaN: true })),
      assayPercent: fc.double({ min: 50, max: 100, noNaN: true }),
    });
    fc.assert(
      fc.property(
        fc.array(addition, { maxLength: 6 }),
        fc.double({ min: 1, max: 200, noNaN: true }),
        (list, volumeL) => {
          const water = saltedWater(volumeL, list);
          expect(Math.abs(chargeBalance(water).imbalancePercent)).toBeLessThan(1e-9);
          for (const ion of ions) expect(water[ion]).toBeGreaterThanOrEqual(0);
        },
      ),
    );
  });

  it('solubility (from memory): says what stays on the floor', () => {
    const much = [
      { salt: 'gypsum', massG: 2 },
      { salt: 'gypsum', massG: 1 },
      { salt: 'calciumCarbonate', massG: 0.5 },
      { salt: 'sodiumChloride', massG: 50 },
    ] as const;
    expect(undissolvedSalts(1, much)).toEqual([
      { salt: 'gypsum', leftG: expect.closeTo(0.6, 9) as number },
      { salt: 'calciumCarbonate', leftG: expect.closeTo(0.487, 9) as number },
    ]);
    expect(undissolvedSalts(20, [{ salt: 'gypsum', massG: 2.4 }])).toEqual([]);
    expect(undissolvedSalts(1, [{ salt: 'gypsum', massG: 3, assayPercent: 80 }])).toEqual([]);
  });

  it('refuses nothing to dissolve in, an empty jar, and an unknown salt', () => {
    expect(() => saltedWater(0, [])).toThrow(RangeError);
    expect(() => saltedWater(1, [{ salt: 'gypsum', massG: 1, assayPercent: 0 }])).toThrow(RangeError);
    expect(() => saltIonMgPerG('sand' as Salt, 'ca')).toThrow(/one of calciumChlorideAnhydrous/);
    expect(() => saltedWater(1, [], { ...pureWater, ca: Number.NaN })).toThrow(RangeError);
  });
});
