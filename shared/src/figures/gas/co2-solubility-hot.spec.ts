import { describe, expect, it } from 'vitest';
import { co2MoleFractionHot } from './co2-solubility-hot.js';

describe('co2MoleFractionHot', () => {
  it.each([
    [0, 1.337],
    [10, 0.95],
    [20, 0.704],
    [30, 0.541],
    [40, 0.431],
    [60, 0.3],
  ])('Carroll 1991 against CRC Handbook table 8-90: %s °C is %s per thousand', (tempC, thousandX) => {
    expect(Math.abs((1000 * co2MoleFractionHot(tempC, 100)) / thousandX - 1)).toBeLessThan(0.03);
  });

  it('refuses more than 1 MPa', () => {
    expect(() => co2MoleFractionHot(20, 1001)).toThrow(RangeError);
  });
});
