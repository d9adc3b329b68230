import { describe, expect, it } from 'vitest';
import { scaldSeconds } from './scald-seconds.js';

describe('scaldSeconds', () => {
  it.each([
    [49, 300],
    [51, 120],
    [52, 90],
    [53, 60],
    [54, 30],
    [55, 17],
    [56, 15],
    [57, 10],
    [58, 3],
    [60, 3],
    [65, 2],
    [66, 1.5],
    [68, 1],
    [69, 1],
    [69.1, '<1'],
    [82, '<1'],
    [20, null],
  ])('hot-water burn tables, the most cautious: %s °C is %s', (tempC, seconds) => {
    expect(scaldSeconds(tempC)).toBe(seconds);
  });

  it('refuses NaN', () => {
    expect(() => scaldSeconds(Number.NaN)).toThrow(RangeError);
  });
});
