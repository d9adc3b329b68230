import { describe, expect, it } from 'vitest';
import {
  bitternessWord,
  hopBitternessIndex,
  humulinoneMgPerL,
  humulinonePercent,
  labBitternessUnits,
} from './bitterness.js';

describe('hop bitterness', () => {
  it('Maye 2015 and judgement: 3 g/L at 0.35 % and 0.8 out are 8.4 mg/L', () => {
    expect(humulinoneMgPerL({ doseGPerL: 3, contentPercent: humulinonePercent(), extractedRatio: 0.8 })).toBeCloseTo(
      8.4,
      9,
    );
    expect(humulinonePercent(0.35)).toBe(0.35);
    expect(humulinonePercent(0.45)).toBe(0.5);
  });

  it('Brauwelt 2017: 48 mg/L from 23.19 g/L at 0.23 % is a share of 0.90', () => {
    const all = humulinoneMgPerL({ doseGPerL: 23.19, contentPercent: 0.23, extractedRatio: 1 });
    expect(Math.abs(48 / all - 0.9)).toBeLessThan(0.01);
  });

  it('Algazzali and Shellhammer 2016 (alpha from memory): 0.0 + 5.5 + 0.6 is 6.1, soft', () => {
    const index = hopBitternessIndex({
      isoMgPerL: 0.014,
      humulinoneMgPerL: 8.4,
      huluponeMgPerL: 0,
      alphaDissolvedMgPerL: 6,
    });
    expect(Math.abs(index - 6.1)).toBeLessThan(0.1);
    expect(bitternessWord(index)).toBe('soft');
  });

  it.each([
    [4.9, 'barely'],
    [5, 'soft'],
    [10, 'clear'],
    [20.1, 'sharp'],
  ])('judgement: %s is %s', (index, word) => {
    expect(bitternessWord(index)).toBe(word);
  });

  it('ASBC Beer-23: an absorbance of 0.5 is 25', () => {
    expect(labBitternessUnits(0.5)).toBe(25);
  });

  it('refuses a negative', () => {
    expect(() =>
      hopBitternessIndex({ isoMgPerL: -1, humulinoneMgPerL: 0, huluponeMgPerL: 0, alphaDissolvedMgPerL: 0 }),
    ).toThrow(RangeError);
    expect(() => bitternessWord(Number.NaN)).toThrow(RangeError);
  });
});
