import { describe, expect, it } from 'vitest';
import { waterFromReport } from './source-water.js';

const report = { caMgPerL: 80, mgMgPerL: 10, naMgPerL: 20, clMgPerL: 40, so4MgPerL: 50 };

describe('waterFromReport', () => {
  it('takes alkalinity either way', () => {
    const asCaCo3 = waterFromReport({ ...report, alkalinity: { as: 'caco3', mgPerL: 100 } });
    const asHco3 = waterFromReport({ ...report, alkalinity: { as: 'hco3', mgPerL: asCaCo3.hco3 } });
    expect(asCaCo3.hco3).toBeCloseTo(121.9, 1);
    expect(asHco3).toEqual(asCaCo3);
    expect(asHco3.k).toBe(0);
  });

  it('refuses a missing number', () => {
    expect(() => waterFromReport({ ...report, alkalinity: { as: 'hco3', mgPerL: Number.NaN } })).toThrow(/alkalinity/);
  });
});
