import { describe, expect, it } from 'vitest';
import { boilingPointAtAltitudeC, correctedTempC } from '../figures/index.js';
import { calibrationOf } from './calibration.js';

const points = (lowShownC: number, highShownC: number, highTrueC = 99.97, lowTrueC = 0) => ({
  low: { shownC: lowShownC, trueC: lowTrueC },
  high: { shownC: highShownC, trueC: highTrueC },
});

describe('calibrationOf', () => {
  it('makes 82.28 °C of 82.0 shown, with ice and boil at 500 m (heat-and-gas, A5)', () => {
    const verdict = calibrationOf(points(0.4, 97.9, boilingPointAtAltitudeC(500)));
    if (verdict.kind !== 'accepted') throw new Error(verdict.reason);
    expect(Math.abs(correctedTempC(82, verdict.correction) - 82.28)).toBeLessThan(0.06);
  });

  it('goes through both points, also when the low one is no ice', () => {
    const verdict = calibrationOf(points(20.5, 61.2, 60.4, 20));
    if (verdict.kind !== 'accepted') throw new Error(verdict.reason);
    expect(correctedTempC(20.5, verdict.correction)).toBeCloseTo(20, 9);
    expect(correctedTempC(61.2, verdict.correction)).toBeCloseTo(60.4, 9);
  });

  it.each([
    ['swapped', points(98, 0.4)],
    ['swapped', points(0.4, 97.9, 0, 99.97)],
    ['too-close', points(0.4, 20.4, 20)],
    ['slope', points(0.4, 93)],
    ['offset', points(3, 102.9)],
  ] as const)('refuses what is %s', (reason, pair) => {
    expect(calibrationOf(pair)).toMatchObject({ kind: 'refused', reason });
  });

  it('refuses NaN', () => {
    expect(() => calibrationOf(points(Number.NaN, 99))).toThrow(RangeError);
  });
});
