import { describe, expect, it } from 'vitest';
import { stationPressureKPa } from './station-pressure.js';

describe('stationPressureKPa', () => {
  it('scales a forecast by altitude (U.S. Standard Atmosphere 1976)', () => {
    expect(stationPressureKPa(101.325, 500)).toBeCloseTo(95.461, 2);
    expect(stationPressureKPa(103, 0)).toBe(103);
  });

  it('refuses hectopascals', () => {
    expect(() => stationPressureKPa(1013, 0)).toThrow(/from 85 to 110 kPa/);
  });
});
