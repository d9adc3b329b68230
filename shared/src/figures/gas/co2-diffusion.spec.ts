import { describe, expect, it } from 'vitest';
import { co2DiffusionM2PerS } from './co2-diffusion.js';

describe('co2DiffusionM2PerS', () => {
  it.each([
    [10, 1.26e-9],
    [20, 1.67e-9],
    [30, 2.17e-9],
  ])('CRC Handbook after Jähne 1987: %s °C is %s m²/s', (tempC, diffusion) => {
    expect(Math.abs(co2DiffusionM2PerS(tempC) / diffusion - 1)).toBeLessThan(0.012);
  });

  it('refuses NaN', () => {
    expect(() => co2DiffusionM2PerS(Number.NaN)).toThrow(RangeError);
  });
});
