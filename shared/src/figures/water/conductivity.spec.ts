import { describe, expect, it } from 'vitest';
import { conductivityUsPerCm, dissolvedIonsMgPerL, ionicStrengthFromConductivity } from './conductivity.js';
import { ionicStrengthMolPerL } from './ionic-strength.js';
import { pureWater } from './ions.js';
import { saltedWater } from './salts.js';

const water = saltedWater(9.4635, [
  { salt: 'calciumChlorideDihydrate', massG: 2.5 },
  { salt: 'gypsum', massG: 1 },
]);

describe('conductivityUsPerCm', () => {
  it('CRC Handbook conductivities (from memory): 659 alone, 606 together', () => {
    const { limiting, estimate } = conductivityUsPerCm(water);
    expect(Math.abs(limiting / 659 - 1)).toBeLessThan(0.01);
    expect(Math.abs(estimate / 606 - 1)).toBeLessThan(0.05);
    expect(dissolvedIonsMgPerL(water) / estimate).toBeCloseTo(0.47, 1);
  });

  it('aqion: the quick way reads 20 to 25 % too high for calcium water', () => {
    const quick = ionicStrengthFromConductivity(conductivityUsPerCm(water).estimate);
    expect(quick / ionicStrengthMolPerL(water)).toBeGreaterThan(1.19);
    expect(quick / ionicStrengthMolPerL(water)).toBeLessThan(1.26);
    expect(() => ionicStrengthFromConductivity(-1)).toThrow(RangeError);
  });

  it('is none in pure water', () => {
    expect(conductivityUsPerCm(pureWater)).toEqual({ limiting: 0, estimate: 0 });
  });
});
