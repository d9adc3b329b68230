import { describe, expect, it } from 'vitest';
import { conductivityUsPerCm, dissolvedIonsMgPerL } from './conductivity.js';
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

  it('is none in pure water', () => {
    expect(conductivityUsPerCm(pureWater)).toEqual({ limiting: 0, estimate: 0 });
  });
});
