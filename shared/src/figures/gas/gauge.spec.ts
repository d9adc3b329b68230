import { describe, expect, it } from 'vitest';
import { absoluteFromGaugeKPa, gaugeFromAbsoluteKPa } from './gauge.js';

describe('gauge and absolute', () => {
  it('differ by the local air', () => {
    expect(absoluteFromGaugeKPa(72.7, 101.325)).toBeCloseTo(174.025, 9);
    expect(gaugeFromAbsoluteKPa(absoluteFromGaugeKPa(30, 83.5), 83.5)).toBeCloseTo(30, 9);
  });

  it('refuses hectopascals', () => {
    expect(() => absoluteFromGaugeKPa(72.7, 1013.25)).toThrow(RangeError);
  });
});
