import { describe, expect, it } from 'vitest';
import { arrheniusFactor } from '../numeric/arrhenius.js';
import { extractionTurns, leafExtraction } from './extraction.js';

const hold = (tempC: number, minutes: number) => [
  { atMs: 0, tempC },
  { atMs: minutes * 60_000, tempC },
];

describe('tea extraction', () => {
  it.each([
    [90, 1.445],
    [25, 0.079],
  ])('Jaganyi and Price 1999: caffeine at %s °C comes at %s a minute', (tempC, perMin) => {
    expect(Math.abs(extractionTurns(hold(tempC, 1), 0.99, 40.3) / perMin - 1)).toBeLessThan(0.01);
  });

  it('Jaganyi and Price 1999: 90 % at 80 °C take 2.33 min', () => {
    expect(Math.abs(Math.LN10 / 0.99 - 2.33)).toBeLessThan(0.01);
    expect(-Math.expm1(-extractionTurns(hold(80, 2.326), 0.99, 40.3))).toBeCloseTo(0.9, 3);
  });

  it('Farakte 2015: 0.257 at 60 °C is 0.50 at 80 °C, 0.685 is 1.33', () => {
    expect(0.257 / arrheniusFactor(60, 32.6, 80)).toBeCloseTo(0.5, 2);
    expect(0.685 / arrheniusFactor(60, 32.6, 80)).toBeCloseTo(1.33, 2);
  });

  it('judgement (factor of two): whole leaf, 4 min at 82 °C', () => {
    const out = leafExtraction(hold(82, 4), 'whole');
    expect(out.caffeineTurns).toBeCloseTo(2.161, 2);
    expect(out.caffeineRatio).toBeCloseTo(0.885 * 0.9, 3);
    expect(out.polyphenolTurns).toBeCloseTo(1.283, 2);
    expect(out.polyphenolRatio).toBeCloseTo(0.72, 2);
  });

  it('cuts the wetting off the start, and holds the rate outside 5 to 100 °C', () => {
    const lag = leafExtraction(hold(82, 4), 'whole', { wettingLagS: 20 });
    expect(lag.caffeineTurns).toBeCloseTo((leafExtraction(hold(82, 4), 'whole').caffeineTurns * 220) / 240, 9);
    expect(leafExtraction(hold(82, 0.2), 'whole', { wettingLagS: 20 }).caffeineRatio).toBe(0);
    expect(extractionTurns(hold(2, 60), 1, 40)).toBe(extractionTurns(hold(5, 60), 1, 40));
  });

  it('refuses an unknown form and a rate of 0', () => {
    expect(() => leafExtraction(hold(82, 4), 'powder' as 'dust')).toThrow(/one of dust, broken, whole/);
    expect(() => leafExtraction(hold(82, 4), 'whole', { rateFactor: 0 })).toThrow(RangeError);
  });
});
