import { describe, expect, it } from 'vitest';
import { atmosphericPressureKPa } from './atmospheric-pressure.js';

describe('atmosphericPressureKPa', () => {
  it.each([
    [0, 101.325],
    [500, 95.461],
    [1500, 84.556],
    [1600, 83.52],
    [3000, 70.109],
  ])('U.S. Standard Atmosphere 1976: %s m is %s kPa', (altitudeM, pressureKPa) => {
    expect(Math.abs(atmosphericPressureKPa(altitudeM) / pressureKPa - 1)).toBeLessThan(0.001);
  });

  it.each([Number.NaN, -501, 11_001])('refuses %s m', (altitudeM) => {
    expect(() => atmosphericPressureKPa(altitudeM)).toThrow(RangeError);
  });
});
