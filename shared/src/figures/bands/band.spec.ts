import { describe, expect, it } from 'vitest';
import { band, plusMinus, sure, weakest, withinFactor } from './band.js';

describe('bands', () => {
  it('say how far and how well', () => {
    expect(withinFactor(6, 2, 'judged')).toEqual({ low: 3, value: 6, high: 12, grade: 'judged' });
    expect(withinFactor(-6, 2, 'judged')).toEqual({ low: -12, value: -6, high: -3, grade: 'judged' });
    expect(plusMinus(4, 0.5, 'measured')).toEqual({ low: 3.5, value: 4, high: 4.5, grade: 'measured' });
    expect(withinFactor(0, 3, 'judged')).toEqual({ low: 0, value: 0, high: 0, grade: 'judged' });
    expect(plusMinus(0.2, 0.5, 'measured')).toMatchObject({ low: -0.3, high: 0.7 });
    expect(sure(2)).toEqual({ low: 2, value: 2, high: 2, grade: 'solid' });
  });

  it('are as good as their weakest link', () => {
    expect(weakest('solid', 'judged', 'measured')).toBe('judged');
    expect(weakest('solid', 'measured')).toBe('measured');
    expect(weakest()).toBe('solid');
  });

  it('refuse ends the wrong way round, and NaN', () => {
    expect(() => band(2, 1, 3, 'solid')).toThrow(/Order its ends/);
    expect(() => band(1, Number.NaN, 3, 'solid')).toThrow(RangeError);
    expect(() => withinFactor(1, 0.5, 'solid')).toThrow(RangeError);
    expect(() => plusMinus(1, -1, 'solid')).toThrow(RangeError);
  });
});
