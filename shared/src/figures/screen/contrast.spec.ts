import { describe, expect, it } from 'vitest';
import { contrastRatio, contrastUnderLight } from './contrast.js';

describe('contrast', () => {
  it.each([
    ['#767676', '#ffffff', 4.542],
    ['#ffcc00', '#000000', 13.889],
    ['#b00020', '#ffffff', 7.325],
  ])('WCAG 2.2: %s on %s is %s', (one, other, ratio) => {
    expect(Math.abs(contrastRatio(one, other) - ratio)).toBeLessThan(0.01);
    expect(contrastRatio(other, one)).toBe(contrastRatio(one, other));
  });

  it.each([
    [500, 48.81],
    [10_000, 3.504],
  ])('diffuse reflection, computed: %s lux leaves %s', (lux, ratio) => {
    const left = contrastUnderLight({ whiteCdPerM2: 400, blackCdPerM2: 0.4, lux, reflectance: 0.05 });
    expect(Math.abs(left / ratio - 1)).toBeLessThan(0.005);
  });

  it('refuses a colour by name', () => {
    expect(() => contrastRatio('red', '#ffffff')).toThrow(/six hex digits/);
  });
});
