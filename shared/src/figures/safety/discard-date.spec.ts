import { describe, expect, it } from 'vitest';
import { discardDate } from './discard-date.js';

describe('discardDate', () => {
  it.each([
    ['2024-03-01', '2024-03-07'],
    ['2024-02-26', '2024-03-03'],
    ['2023-12-28', '2024-01-03'],
  ])('FDA Food Code 3-501.17: made %s, gone after %s', (made, last) => {
    expect(discardDate(made)).toBe(last);
  });

  it.each(['2024-02-30', '26.2.2024', ''])('refuses %j', (made) => {
    expect(() => discardDate(made)).toThrow(RangeError);
  });
});
