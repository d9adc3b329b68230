import { describe, expect, it } from 'vitest';
import { alphaLossPercent, alphaNowPercent } from './freshness.js';

describe('freshness of hops', () => {
  it('Nickerson and Likens 1979: 5.4 % lost at an index of 0.28, 10 % at 0.31 (BarthHaas)', () => {
    expect(Math.abs(alphaLossPercent(0.28) - 5.4)).toBeLessThan(0.1);
    expect(alphaLossPercent(0.31)).toBeCloseTo(10, 0);
    expect(alphaLossPercent(0.22)).toBe(0);
  });

  it('Nickerson and Likens 1979: laboratories differ by 2.8 % in the index, 1.3 points in the loss', () => {
    expect(Math.abs(alphaLossPercent(0.4 * 1.028) - alphaLossPercent(0.4) - 1.3)).toBeLessThan(0.05);
    expect(alphaLossPercent(0.4, 101.8)).toBeLessThan(alphaLossPercent(0.4, 114.6));
  });

  it('Purdue 2020: 14.5 to 23.4 % lost in 168 days', () => {
    const now = alphaNowPercent({ harvestPercent: 10, ageDays: 168 });
    expect(100 - 10 * now.high).toBeCloseTo(14.5, 0);
    expect(100 - 10 * now.low).toBeCloseTo(23.4, 0);
    expect(now.from).toBe('age');
  });

  it('takes the index before the age, with its band', () => {
    const now = alphaNowPercent({ harvestPercent: 9, storageIndex: 0.31 });
    expect(now.value).toBeCloseTo(8.08, 2);
    expect(now.low).toBeLessThan(now.value);
    expect(now.high).toBeGreaterThan(now.value);
  });

  it('refuses an index of 0 and a negative age', () => {
    expect(() => alphaLossPercent(0)).toThrow(RangeError);
    expect(() => alphaNowPercent({ harvestPercent: 9, ageDays: -1 })).toThrow(RangeError);
  });
});
