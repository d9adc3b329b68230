import { describe, expect, it } from 'vitest';
import { ionicStrengthMolPerL } from './ionic-strength.js';
import { pureWater } from './ions.js';
import { saltedWater } from './salts.js';

describe('ionicStrengthMolPerL', () => {
  it('definition: 2.5 g calcium chloride dihydrate and 1 g gypsum in 2.5 US gal give 0.00785', () => {
    const water = saltedWater(9.4635, [
      { salt: 'calciumChlorideDihydrate', massG: 2.5 },
      { salt: 'gypsum', massG: 1 },
    ]);
    expect(Math.abs(ionicStrengthMolPerL(water) - 0.00785)).toBeLessThan(0.00002);
  });

  it('is none in pure water', () => {
    expect(ionicStrengthMolPerL(pureWater)).toBe(0);
    expect(() => ionicStrengthMolPerL({ ...pureWater, k: -1 })).toThrow(RangeError);
  });
});
