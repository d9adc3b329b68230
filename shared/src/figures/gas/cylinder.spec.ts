import { describe, expect, it } from 'vitest';
import { cylinderLeftG, cylinderVolumeL, liquidGoneBelowG } from './cylinder.js';

describe('CO2 cylinder', () => {
  it('49 CFR 173.304a: 2.268 kg at 68 % is 3.335 L', () => {
    expect(cylinderVolumeL(2268)).toBeCloseTo(3.335, 3);
  });

  it.each([
    [25, 810, 0.36],
    [0, 326, 0.14],
  ])('Span and Wagner 1996: at %s °C the liquid is gone at %s g, a share of %s', (tempC, leftG, share) => {
    const answer = liquidGoneBelowG(2268, tempC) ?? 0;
    expect(Math.abs(answer / leftG - 1)).toBeLessThan(0.01);
    expect(answer / 2268).toBeCloseTo(share, 2);
  });

  it('has no liquid on a hot day', () => {
    expect(liquidGoneBelowG(2268, 35)).toBeNull();
  });

  it('weighs what is left, never less than nothing', () => {
    expect(cylinderLeftG({ scaleG: 5200, tareG: 3500, regulatorG: 700 })).toBe(1000);
    expect(cylinderLeftG({ scaleG: 4000, tareG: 3500, regulatorG: 700 })).toBe(0);
    expect(() => cylinderLeftG({ scaleG: Number.NaN, tareG: 0, regulatorG: 0 })).toThrow(RangeError);
  });
});
