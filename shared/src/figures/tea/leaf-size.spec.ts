import { describe, expect, it } from 'vitest';
import { leafSizeRateFactor, molarMassRateRatio } from './leaf-size.js';

describe('leaf size', () => {
  it('Price and Spiro 1985: 2.2 times between 925 and 550 µm is a power of 1.52', () => {
    expect(Math.abs(Math.log(2.2) / Math.log(925 / 550) - 1.52)).toBeLessThan(0.01);
    expect(leafSizeRateFactor(550, 925)).toBeCloseTo(2.2, 1);
  });

  it('Price and Spitzer 1994: EGCG against EC is 0.796', () => {
    expect(Math.abs(molarMassRateRatio(458.37, 290.27) - 0.796)).toBeLessThan(0.002);
  });

  it('refuses a size of 0', () => {
    expect(() => leafSizeRateFactor(0, 1)).toThrow(RangeError);
    expect(() => molarMassRateRatio(458, Number.NaN)).toThrow(RangeError);
  });
});
