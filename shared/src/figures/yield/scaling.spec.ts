import { describe, expect, it } from 'vitest';
import { scaledCoolingConstantPerS, scaledMassG, volumeForStockL } from './scaling.js';

describe('scaling', () => {
  it('keeps grams per litre, rounded to the scale', () => {
    expect(scaledMassG(40, 20, 12.4)).toBeCloseTo(24.8, 9);
    expect(scaledMassG(40, 20, 12.4, 1)).toBe(25);
    expect(scaledMassG(6, 20, 1, 0.1)).toBe(0.3);
    expect(scaledMassG(0.4, 20, 1, 1)).toBe(1);
    expect(scaledMassG(0, 20, 1, 1)).toBe(0);
  });

  it('brews what the shortest store allows', () => {
    const needs = [
      { name: 'tea', massG: 55, stockG: 34 },
      { name: 'hops', massG: 60, stockG: 500 },
      { name: 'salt', massG: 0, stockG: 0 },
    ];
    expect(volumeForStockL(20, needs)).toEqual({ volumeL: expect.closeTo(12.36, 2) as number, limitedBy: 'tea' });
    expect(volumeForStockL(20, [])).toEqual({ volumeL: 20, limitedBy: null });
  });

  it('cools a larger kettle slower', () => {
    expect(scaledCoolingConstantPerS(2e-4, 10, 80)).toBeCloseTo(1e-4, 12);
    expect(() => scaledCoolingConstantPerS(2e-4, 0, 80)).toThrow(RangeError);
    expect(() => scaledMassG(-1, 20, 10)).toThrow(RangeError);
  });
});
