import { describe, expect, it } from 'vitest';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { co2VirialCm3PerMol } from './co2-virial.js';

describe('co2VirialCm3PerMol', () => {
  it('Weiss 1974 (coefficients from memory): 22.264 L/mol at 0 °C and 1 atm', () => {
    const idealLPerMol = (GAS_CONSTANT_J_PER_MOL_K * 273.15) / 101.325;
    expect(idealLPerMol + co2VirialCm3PerMol(0) / 1000).toBeCloseTo(22.264, 2);
  });

  it('refuses NaN', () => {
    expect(() => co2VirialCm3PerMol(Number.NaN)).toThrow(RangeError);
  });
});
