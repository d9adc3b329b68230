import { describe, expect, it } from 'vitest';
import { daviesActivity, debyeHuckelA, extendedDebyeHuckelActivity } from './activity.js';

describe('activity', () => {
  it.each([
    [0, 0.4883],
    [25, 0.5085],
    [60, 0.5425],
  ])('Freeze and Cherry 1979: A at %s °C is %s', (tempC, a) => {
    expect(Math.abs(debyeHuckelA(tempC) / a - 1)).toBeLessThan(0.01);
  });

  it.each([
    [4, 1, 0.964],
    [6, 2, 0.87],
  ])('Freeze and Cherry 1979, table: size %s Å, charge %s, 0.001 mol/L is %s', (size, charge, gamma) => {
    expect(Math.abs(extendedDebyeHuckelActivity(charge, 0.001, size) - gamma)).toBeLessThan(0.003);
  });

  it('Davies 1962 agrees where both are good, and leaves neutrals alone', () => {
    const a = debyeHuckelA(25);
    expect(daviesActivity(1, 0.001, a)).toBeCloseTo(extendedDebyeHuckelActivity(1, 0.001, 4), 2);
    expect(daviesActivity(0, 0.3, a)).toBe(1);
    expect(daviesActivity(2, 0, a)).toBe(1);
    expect(daviesActivity(2, 0.9, a)).toBe(daviesActivity(2, 0.5, a));
  });

  it('refuses a negative strength', () => {
    expect(() => daviesActivity(1, -1, 0.5)).toThrow(RangeError);
    expect(() => debyeHuckelA(Number.NaN)).toThrow(RangeError);
  });
});
