import { describe, expect, it } from 'vitest';
import { latentHeatJPerKg } from './latent-heat.js';

describe('latentHeatJPerKg', () => {
  // IAPWS-95, steam table values.
  it.each([
    [0, 2_500_900],
    [50, 2_382_000],
    [100, 2_256_500],
  ])('IAPWS-95: %s °C is %s J/kg within 0.5 %%', (tempC, heat) => {
    expect(Math.abs(latentHeatJPerKg(tempC) / heat - 1)).toBeLessThan(0.005);
  });

  it('refuses ice', () => {
    expect(() => latentHeatJPerKg(-1)).toThrow(RangeError);
  });
});
