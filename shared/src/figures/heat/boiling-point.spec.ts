import { describe, expect, it } from 'vitest';
import { boilingPointAtAltitudeC, boilingPointC } from './boiling-point.js';

describe('boiling point', () => {
  it.each([
    [0, 99.97],
    [500, 98.31],
    [1500, 94.98],
    [3000, 89.97],
  ])('IAPWS SR1-86 and U.S. Standard Atmosphere 1976: %s m is %s °C', (altitudeM, tempC) => {
    expect(Math.abs(boilingPointAtAltitudeC(altitudeM) - tempC)).toBeLessThan(0.06);
  });

  it('IAPWS SR1-86: 95.0 kPa is 98.18 °C', () => {
    expect(Math.abs(boilingPointC(95) - 98.18)).toBeLessThan(0.06);
  });

  it('IAPWS SR1-86: 0.277 K/kPa at sea level, 0.336 K/kPa at 80 kPa', () => {
    expect(boilingPointC(101.825) - boilingPointC(100.825)).toBeCloseTo(0.277, 2);
    expect(boilingPointC(80.5) - boilingPointC(79.5)).toBeCloseTo(0.336, 2);
  });

  it.each([Number.NaN, 0, 1013_25])('refuses %s kPa', (pressureKPa) => {
    expect(() => boilingPointC(pressureKPa)).toThrow(RangeError);
  });
});
