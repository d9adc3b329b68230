import { describe, expect, it } from 'vitest';
import { alkalinityAsCaCo3, alkalinityMeqPerL, hardnessAsCaCo3, hco3FromCaCo3 } from './alkalinity.js';
import { pureWater } from './ions.js';

describe('alkalinity and hardness', () => {
  it('stoichiometry: 0.8202 of bicarbonate, and back', () => {
    expect(alkalinityAsCaCo3(100)).toBeCloseTo(82.02, 2);
    expect(alkalinityAsCaCo3(hco3FromCaCo3(137))).toBeCloseTo(137, 9);
    expect(alkalinityMeqPerL({ ...pureWater, hco3: hco3FromCaCo3(100) })).toBeCloseTo(1.998, 3);
  });

  it('stoichiometry: Ca 96.62 mg/L is 241.3 mg/L as CaCO3', () => {
    expect(Math.abs(hardnessAsCaCo3({ ...pureWater, ca: 96.62 }) - 241.3)).toBeLessThan(0.3);
    expect(hardnessAsCaCo3({ ...pureWater, mg: 10 })).toBeCloseTo(41.18, 9);
  });

  it('refuses a negative', () => {
    expect(() => alkalinityAsCaCo3(-1)).toThrow(RangeError);
    expect(() => hardnessAsCaCo3({ ...pureWater, ca: Number.NaN })).toThrow(RangeError);
  });
});
