import { describe, expect, it } from 'vitest';
import { probeLag } from './probe-lag.js';

describe('probeLag', () => {
  it.each([
    [5.2, 9.8, 2.86, 3.22, 6.08],
    [10.4, 23.2, 7.95, 4.89, 12.84],
    [1.2, 2.9, 1.06, 0.47, 1.52],
    [4.0, 9.6, 3.48, 1.59, 5.07],
    [0.22, 0.75, 0.33, 0, 0.32],
    [46.8, 121, 46.1, 14.8, 61],
  ])('SAB Broeckskes, reaction times: t50 %s s and t90 %s s', (t50S, t90S, tauS, deadTimeS, rampLagS) => {
    const lag = probeLag(t50S, t90S);
    const digit = tauS > 40 ? 0.1 : 0.012;
    expect(Math.abs(lag.tauS - tauS)).toBeLessThan(digit);
    expect(Math.abs(lag.deadTimeS - deadTimeS)).toBeLessThan(digit);
    expect(Math.abs(lag.rampLagS - rampLagS)).toBeLessThan(digit);
  });

  it('refuses times the wrong way round', () => {
    expect(() => probeLag(10, 5)).toThrow(RangeError);
  });
});
