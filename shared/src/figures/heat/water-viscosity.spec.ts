import { describe, expect, it } from 'vitest';
import { waterViscosityPaS } from './water-viscosity.js';

describe('waterViscosityPaS', () => {
  it.each([
    [3, 1.62e-3],
    [4, 1.567e-3],
    [20, 1.0016e-3],
  ])('IAPWS SR6-08 (coefficients from memory): %s °C is %s Pa s', (tempC, viscosity) => {
    expect(Math.abs(waterViscosityPaS(tempC) / viscosity - 1)).toBeLessThan(0.002);
  });

  it('refuses ice', () => {
    expect(() => waterViscosityPaS(-1)).toThrow(RangeError);
  });
});
