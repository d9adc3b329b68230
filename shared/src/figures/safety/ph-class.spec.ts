import { describe, expect, it } from 'vitest';
import { phBand, phMethod, tcsClass } from './ph-class.js';

describe('classes by pH', () => {
  it.each([
    [3.9, 0.99, 'not-sealed', 'non-tcs'],
    [4.2, 0.99, 'not-sealed', 'product-assessment'],
    [4.5, 0.99, 'not-sealed', 'product-assessment'],
    [4.6, 0.99, 'heated-and-sealed', 'non-tcs'],
    [4.7, 0.99, 'heated-and-sealed', 'product-assessment'],
    [5.0, 0.89, 'not-sealed', 'non-tcs'],
    [5.1, 0.89, 'not-sealed', 'product-assessment'],
    [4.6, 0.91, 'not-sealed', 'non-tcs'],
    [5.7, 0.93, 'heated-and-sealed', 'product-assessment'],
    [7, 0.87, 'not-sealed', 'non-tcs'],
    [7, 0.9, 'heated-and-sealed', 'non-tcs'],
  ] as const)('FDA Food Code tables: pH %s, water activity %s, %s is %s', (ph, waterActivity, table, tcs) => {
    expect(tcsClass({ ph, waterActivity, table })).toBe(tcs);
  });

  it.each([
    [4.0, 0, 'acid'],
    [4.1, 0, 'below-assessment'],
    [4.1, 0.1, 'assessment'],
    [4.2, 0, 'assessment'],
    [4.6, 0, 'assessment'],
    [4.55, 0.1, 'low-acid'],
  ] as const)('J. Food Prot. 74, 1670 and Food Code: pH %s, meter %s, is %s', (ph, uncertainty, band) => {
    expect(phBand(ph, uncertainty)).toBe(band);
  });

  it('21 CFR 114: a meter above 4.0', () => {
    expect(phMethod(4.2)).toBe('meter');
    expect(phMethod(4.0)).toBe('any-suitable');
  });

  it('refuses a pH of 15', () => {
    expect(() => phBand(15)).toThrow(RangeError);
    expect(() => tcsClass({ ph: Number.NaN, table: 'not-sealed' })).toThrow(RangeError);
  });
});
