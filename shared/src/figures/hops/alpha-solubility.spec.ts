import { describe, expect, it } from 'vitest';
import { alphaSolubilityAt60, alphaSolubilityMgPerL } from './alpha-solubility.js';

describe('alphaSolubilityMgPerL', () => {
  it.each([
    [60, 3.7, 20.3],
    [100, 5.2, 66.8],
  ])('judgement (factor of three): at %s °C and pH %s %s mg/L dissolve', (tempC, ph, mgPerL) => {
    expect(Math.abs(alphaSolubilityMgPerL(tempC, ph) / mgPerL - 1)).toBeLessThan(0.01);
  });

  it('judgement: cold puts it out, and acid below 4.5 has nothing left to put out', () => {
    expect(alphaSolubilityMgPerL(4, 3.7)).toBeCloseTo(6.6, 1);
    expect(alphaSolubilityMgPerL(60, 5.5) / alphaSolubilityMgPerL(60, 3.5)).toBeCloseTo(2, 1);
    expect(alphaSolubilityMgPerL(60, 3.7, alphaSolubilityAt60.low)).toBeLessThan(8);
  });

  it('refuses a pH that is no number, and a solubility of 0', () => {
    expect(() => alphaSolubilityMgPerL(60, Number.NaN)).toThrow(RangeError);
    expect(() => alphaSolubilityMgPerL(60, 4, 0)).toThrow(RangeError);
  });
});
