import { describe, expect, it } from 'vitest';
import { stillDurationS, stillGPerL, stillUptakePerH } from './carbonation-still.js';

const keg = { startGPerL: 0, restGPerL: 5, uptakePerH: 0.02 };

describe('still carbonation', () => {
  it.each([
    [3, 0.02],
    [10, 0.025],
  ])('plume scaling, computed (factor of two): first uptake at %s °C is %s 1/h', (tempC, perH) => {
    expect(Math.abs(stillUptakePerH({ tempC, restGPerL: 5 }) / perH - 1)).toBeLessThan(0.04);
  });

  it.each([
    [0.5, 39],
    [0.8, 106],
    [0.9, 173],
    [0.95, 257],
  ])('plume scaling, computed: a share of %s takes %s h', (share, hours) => {
    expect(Math.abs((stillDurationS(keg, 5 * share) ?? 0) / 3600 / hours - 1)).toBeLessThan(0.01);
  });

  it('goes on from where it is, and comes back to the content', () => {
    const half = stillDurationS(keg, 2.5) ?? 0;
    const rest = stillDurationS({ ...keg, startGPerL: 2.5 }, 4.5) ?? 0;
    expect(half + rest).toBeCloseTo(stillDurationS(keg, 4.5) ?? 0, 6);
    expect(stillGPerL(keg, half)).toBeCloseTo(2.5, 9);
  });

  it('never reaches the rest, and stays when it holds more', () => {
    expect(stillDurationS(keg, 5)).toBeNull();
    expect(stillDurationS({ ...keg, startGPerL: 4 }, 3)).toBeNull();
    expect(stillDurationS(keg, 0)).toBe(0);
    expect(stillGPerL({ ...keg, startGPerL: 6 }, 1e6)).toBe(6);
    expect(() => stillDurationS({ ...keg, restGPerL: 0 }, 3)).toThrow(RangeError);
  });
});
