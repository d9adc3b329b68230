import { describe, expect, it } from 'vitest';
import { co2Band } from './co2-band.js';

describe('co2Band', () => {
  it.each([
    [420, 'normal'],
    [4999, 'normal'],
    [5000, 'ventilate'],
    [30_000, 'leave'],
    [40_000, 'evacuate'],
  ] as const)('OSHA and NIOSH limits: %s ppm is %s', (ppm, band) => {
    expect(co2Band(ppm)).toBe(band);
  });

  it('refuses NaN', () => {
    expect(() => co2Band(Number.NaN)).toThrow(RangeError);
  });
});
