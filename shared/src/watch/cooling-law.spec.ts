import { describe, expect, it } from 'vitest';
import { crossingLateByS, newtonAfter, newtonSecondsTo, secondsToFall } from './cooling-law.js';

describe('secondsToFall', () => {
  const fall = 0.013455;
  it.each([
    [1, 469.4],
    [1.25, 475.5],
    [1.4, 479.3],
    [2.2, 499.8],
    [2.4, 505.1],
  ])('83 to 77 °C in a 22 °C room with exponent %f takes %f s', (exponent, seconds) => {
    const found = secondsToFall(83, 77, fall, { referenceC: 22, exponent });
    expect(Math.abs(found! / seconds - 1)).toBeLessThan(0.003);
  });

  it('knows no way to a target outside the fall', () => {
    const law = { referenceC: 22, exponent: 1 };
    expect(secondsToFall(83, 84, fall, law)).toBeNull();
    expect(secondsToFall(83, 20, fall, law)).toBeNull();
    expect(secondsToFall(83, 77, 0, law)).toBeNull();
  });
});

describe('Newton cooling', () => {
  it('gives the known values', () => {
    expect(newtonAfter(85, 22, 2e-4, 600)).toBeCloseTo(77.88, 2);
    expect(newtonSecondsTo(85, 77, 22, 2e-4)).toBeCloseTo(678.9, 0);
    expect(newtonSecondsTo(60, 40, 15, 1 / 400)).toBeCloseTo(235.1, 1);
    expect(newtonSecondsTo(60, 21, 15, 1 / 400)).toBeCloseTo(806.0, 1);
  });

  it('never reaches the surroundings, or what lies behind', () => {
    expect(newtonSecondsTo(60, 15, 15, 1 / 400)).toBeNull();
    expect(newtonSecondsTo(60, 61, 15, 1 / 400)).toBeNull();
    expect(newtonSecondsTo(60, 10, 15, 1 / 400)).toBeNull();
  });
});

describe('crossingLateByS', () => {
  it('is the lag on a ramp and a little more on an exponential', () => {
    expect(crossingLateByS(10, 0)).toBe(10);
    expect(crossingLateByS(10, 1 / 400)).toBeCloseTo(10.127, 3);
    expect(crossingLateByS(500, 1 / 400)).toBe(Infinity);
  });
});
