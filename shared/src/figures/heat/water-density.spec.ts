import { describe, expect, it } from 'vitest';
import { waterDensityKgPerM3 } from './water-density.js';

describe('waterDensityKgPerM3', () => {
  it.each([
    [0, 999.84],
    [4, 999.97],
    [15, 999.1],
    [20, 998.2],
    [60, 983.2],
    [82, 970.54],
    [100, 958.36],
  ])('Kell 1975: %s °C is %s kg/m³', (tempC, density) => {
    expect(Math.abs(waterDensityKgPerM3(tempC) - density)).toBeLessThan(0.05);
  });

  // Tanaka 2001 (Metrologia 38, 301), an independent table for 0 to 40 °C; coefficients from memory.
  it.each([1, 7, 12, 25, 33, 40])('agrees with Tanaka 2001 at %s °C', (t) => {
    const tanaka = 999.97495 * (1 - ((t - 3.983035) ** 2 * (t + 301.797)) / (522528.9 * (t + 69.34881)));
    expect(Math.abs(waterDensityKgPerM3(t) - tanaka)).toBeLessThan(0.02);
  });

  it.each([Number.NaN, -0.1, 151, Infinity])('refuses %s °C', (tempC) => {
    expect(() => waterDensityKgPerM3(tempC)).toThrow(RangeError);
  });
});
