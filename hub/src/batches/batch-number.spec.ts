import { describe, expect, it } from 'vitest';
import { formatBatchNumber } from './batch-number.js';

describe(formatBatchNumber, () => {
  it.each([
    [2026, 14, '26-014'],
    [2000, 1, '00-001'],
    [2109, 1234, '09-1234'],
  ])('%s, %s is %s', (year, numberInYear, words) => {
    expect(formatBatchNumber({ year, numberInYear })).toBe(words);
  });
});
