import { describe, expect, it } from 'vitest';
import { waterVapourPressureKPa } from '../heat/vapour-pressure.js';
import { co2MolPerKg } from './co2-solubility.js';
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

  it('agrees with Weiss 1974 up to ten atmospheres; tenfold pressure is less than tenfold gas', () => {
    for (const co2KPa of [100, 300, 1000]) {
      const molPerKg = co2MolPerKg(20, co2KPa + waterVapourPressureKPa(20));
      const share = molPerKg / (molPerKg + 55.508);
      expect(Math.abs(co2MoleFractionHot(20, co2KPa) / share - 1)).toBeLessThan(0.04);
    }
    expect(co2MoleFractionHot(120, 1000) / co2MoleFractionHot(120, 100)).toBeLessThan(10);
    expect(co2MoleFractionHot(20, 0)).toBe(0);
  });

  it('refuses more than 1 MPa', () => {
    expect(() => co2MoleFractionHot(20, 1001)).toThrow(RangeError);
  });
});
