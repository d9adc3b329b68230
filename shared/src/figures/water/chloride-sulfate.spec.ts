import { describe, expect, it } from 'vitest';
import { chlorideSulfate } from './chloride-sulfate.js';
import { pureWater } from './ions.js';
import { saltedWater, type Salt, type SaltAddition } from './salts.js';

const ratios = (salt: Salt, massG: number, volumeL = 9.4635) => {
  const salts: SaltAddition[] = [
    { salt, massG },
    { salt: 'gypsum', massG: 1 },
  ];
  return chlorideSulfate(saltedWater(volumeL, salts), salts);
};

describe('chlorideSulfate', () => {
  it('stoichiometry: 2.5 g of dihydrate to 1 g of gypsum is 2.161 by mg/L and 2.5 as weighed', () => {
    const both = ratios('calciumChlorideDihydrate', 2.5);
    expect(Math.abs((both.byIonMass ?? 0) - 2.161)).toBeLessThan(0.002);
    expect(both.bySaltMass).toBe(2.5);
    expect((both.byMole ?? 0) / (both.byIonMass ?? 1)).toBeCloseTo(2.71, 2);
  });

  it.each<[Salt, number]>([
    ['calciumChlorideDihydrate', 0.8644],
    ['calciumChlorideAnhydrous', 1.1451],
  ])('stoichiometry: one to one with %s is %s', (salt, ratio) => {
    expect(ratios(salt, 1).byIonMass).toBeCloseTo(ratio, 3);
  });

  it('has none without sulfate, and refuses NaN', () => {
    expect(chlorideSulfate(pureWater)).toEqual({ byIonMass: null, byMole: null, bySaltMass: null });
    expect(() => chlorideSulfate({ ...pureWater, cl: Number.NaN })).toThrow(RangeError);
  });
});
