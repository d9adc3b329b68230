import { describe, expect, it } from 'vitest';
import { cssPxForMm, letterHeightMm, mmForCssPx } from './letter-height.js';

describe('letters and fingers', () => {
  it.each([
    [500, 20, 2.909],
    [1000, 22, 6.4],
    [2000, 20, 11.636],
    [3000, 16, 13.963],
  ])('ISO 9241: %s mm away, %s arcmin is %s mm', (distanceMm, arcmin, heightMm) => {
    expect(Math.abs(letterHeightMm(distanceMm, arcmin) - heightMm)).toBeLessThan(0.01);
  });

  it('a 264 ppi panel at two pixels: 20 mm are 103.94 CSS px, 44 CSS px are 8.467 mm', () => {
    expect(Math.abs(cssPxForMm(20, 264, 2) - 103.94)).toBeLessThan(0.05);
    expect(Math.abs(mmForCssPx(44, 264, 2) - 8.467)).toBeLessThan(0.01);
  });

  it('refuses a distance of 0', () => {
    expect(() => letterHeightMm(0, 20)).toThrow(RangeError);
  });
});
