import { describe, expect, it } from 'vitest';
import { waterVapourPressureKPa } from './vapour-pressure.js';

describe('waterVapourPressureKPa', () => {
  it.each([
    [0.01, 0.6117],
    [20, 2.3392],
    [60, 19.947],
    [82, 51.388],
    [95, 84.609],
    [100, 101.418],
  ])('IAPWS SR1-86: %s °C is %s kPa', (tempC, pressureKPa) => {
    expect(Math.abs(waterVapourPressureKPa(tempC) / pressureKPa - 1)).toBeLessThan(0.003);
  });

  // Antoine form, constants from memory: within 1 % from 1 to 100 °C.
  it.each([5, 30, 50, 75, 100])('stays within 1 %% of the simple form at %s °C', (tempC) => {
    const simpleKPa = 10 ** (8.07131 - 1730.63 / (233.426 + tempC)) * 0.13332236842;
    expect(Math.abs(waterVapourPressureKPa(tempC) / simpleKPa - 1)).toBeLessThan(0.01);
  });

  it.each([Number.NaN, -1, 374])('refuses %s °C', (tempC) => {
    expect(() => waterVapourPressureKPa(tempC)).toThrow(RangeError);
  });
});
