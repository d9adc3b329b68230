import { describe, expect, it } from 'vitest';
import { crossingLateS } from './crossing-late.js';

describe(crossingLateS, () => {
  it('is a little more than the lag on an exponential', () => {
    // Derived: -400 ln(1 - 10/400).
    expect(crossingLateS(10, 1 / 400)).toBeCloseTo(10.127, 3);
  });

  it('is the lag on a ramp', () => {
    expect(crossingLateS(10, 0)).toBe(10);
  });

  it('never comes when the liquid is quicker than the probe', () => {
    expect(crossingLateS(10, 0.1)).toBe(Infinity);
  });

  it('refuses a lag that cannot be', () => {
    expect(() => crossingLateS(-1, 0.01)).toThrow(RangeError);
    expect(() => crossingLateS(Number.NaN, 0.01)).toThrow(RangeError);
  });
});
