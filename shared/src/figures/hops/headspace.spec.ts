import { describe, expect, it } from 'vitest';
import { airWaterRatio, airWaterRatioAt, headspaceRatio } from './headspace.js';

describe('aroma over the drink', () => {
  it.each([
    ['limonene', 0.18],
    ['alphaPinene', 0.59],
  ] as const)('Sander 2023, computed: 20 L under 5 L of air lose %s at %s', (kind, share) => {
    expect(headspaceRatio(airWaterRatio[kind], 20, 5)).toBeCloseTo(share, 2);
  });

  it('Sander 2023, computed: terpene alcohols stay, and 10 °C are 1.6 to 1.8 times', () => {
    expect(headspaceRatio(airWaterRatio.terpeneAlcohol, 20, 5)).toBeLessThanOrEqual(0.0005);
    expect(airWaterRatioAt(1, 35)).toBeCloseTo(1.67, 1);
  });

  it('refuses no drink', () => {
    expect(() => headspaceRatio(1, 0, 5)).toThrow(RangeError);
  });
});
