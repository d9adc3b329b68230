import { describe, expect, it } from 'vitest';
import { pureWater } from './ions.js';
import { salinity } from './salinity.js';

describe('salinity', () => {
  it('common usage and Davies 1962: fresh to 1000 mg/L, salt from 0.5 mol/L', () => {
    const sodiumChloride = (gPerL: number) => ({ ...pureWater, na: 393 * gPerL, cl: 607 * gPerL });
    expect(salinity(pureWater)).toBe('fresh');
    expect(salinity({ ca: 140, mg: 25, na: 30, k: 3, cl: 60, so4: 80, hco3: 430 })).toBe('fresh');
    expect(salinity(sodiumChloride(3))).toBe('brackish');
    expect(salinity({ ca: 412, mg: 1290, na: 10_770, k: 399, cl: 19_350, so4: 2712, hco3: 142 })).toBe('salt');
    expect(() => salinity({ ...pureWater, na: -1 })).toThrow(RangeError);
  });
});
