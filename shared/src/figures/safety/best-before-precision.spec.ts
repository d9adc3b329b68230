import { describe, expect, it } from 'vitest';
import { bestBeforePrecision } from './best-before-precision.js';

describe('bestBeforePrecision', () => {
  it.each([
    [2, 'day-and-month'],
    [3, 'day-and-month'],
    [3.1, 'month-and-year'],
    [18, 'month-and-year'],
    [19, 'year'],
  ])('Regulation (EU) 1169/2011 (from memory): %s months are written by %s', (months, precision) => {
    expect(bestBeforePrecision(months)).toBe(precision);
  });

  it('refuses no time at all', () => {
    expect(() => bestBeforePrecision(0)).toThrow(RangeError);
  });
});
