import { describe, expect, it } from 'vitest';
import { entryOf, finite, notNegative, positive, within } from './guard.js';

describe('guards', () => {
  it('lets good values through', () => {
    expect(within(3, 'x', 0, 5)).toBe(3);
    expect(positive(1, 'x')).toBe(1);
    expect(notNegative(0, 'x')).toBe(0);
    expect(finite(-2, 'x')).toBe(-2);
    expect(finite(1.8e12, 'An instant', 'ms')).toBe(1.8e12);
    expect(entryOf({ a: 1 }, 'a', 'x')).toBe(1);
  });

  it.each([
    () => within(Number.NaN, 'A temperature', 0, 100, '°C'),
    () => within(101, 'A temperature', 0, 100, '°C'),
    () => positive(0, 'A mass', 'g'),
    () => positive(Infinity, 'A mass'),
    () => notNegative(-1, 'A mass', 'g'),
    () => finite(Number.NaN, 'A number', 'kPa'),
    () => positive(1e9, 'A mass', 'g'),
    () => notNegative(1e9, 'A duration', 's'),
    () => finite(-300, 'A temperature', '°C'),
    () => finite(1e9, 'A gauge pressure', 'kPa'),
    () => entryOf<string, number>({ a: 1 }, 'toString', 'A letter'),
  ])('names what was wrong and what to do (%#)', (act) => {
    expect(act).toThrow(RangeError);
    expect(act).toThrow(/must be .* got .*\. (Give|Choose|Check)/);
  });
});
