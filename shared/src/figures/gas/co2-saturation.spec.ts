import { describe, expect, it } from 'vitest';
import { CO2_CRITICAL_C, co2SaturationKPa, co2VapourDensityKgPerM3 } from './co2-saturation.js';

describe('CO2 over its liquid', () => {
  it.each([
    [0, 3485],
    [20, 5729],
  ])('Span and Wagner 1996: %s °C is %s kPa', (tempC, pressureKPa) => {
    expect(Math.abs(co2SaturationKPa(tempC) / pressureKPa - 1)).toBeLessThan(0.002);
  });

  it.each([
    [0, 97.6],
    [20, 194],
    [25, 242.7],
  ])('Span and Wagner 1996: at %s °C the gas weighs %s kg/m³', (tempC, density) => {
    expect(Math.abs(co2VapourDensityKgPerM3(tempC) / density - 1)).toBeLessThan(0.005);
  });

  it('has no liquid above 31 °C', () => {
    expect(CO2_CRITICAL_C).toBeCloseTo(30.98, 2);
    expect(() => co2SaturationKPa(32)).toThrow(RangeError);
  });
});
