import { describe, expect, it } from 'vitest';
import { leafBase, leafBaseExtractedRatio, leafBaseMeqPerG } from './leaf-base.js';
import { solvePh } from './solve-ph.js';

describe('base of leaf', () => {
  it('judgement: two sites hold the base at pH 5.5, 0.9496 loaded', () => {
    const { strongIonEqPerL, sites } = leafBase(1);
    expect(strongIonEqPerL).toBe(0.001);
    expect(strongIonEqPerL / sites.reduce((sum, { molPerL }) => sum + molPerL, 0)).toBeCloseTo(0.9496, 4);
  });

  it('judgement: leaf alone gives about its native pH', () => {
    const { strongIonEqPerL, sites } = leafBase(1);
    const { ph } = solvePh({ acidsMolPerL: {}, strongIonEqPerL, sites, tempC: 25 });
    expect(Math.abs(ph - 5.5)).toBeLessThan(0.05);
  });

  it('ISO 3720: ash alkalinity of 1 % as KOH is 0.178 meq/g, and tea sits inside 1 to 3 %', () => {
    const meqPerPercent = 1000 / 56.106 / 100;
    expect(Math.abs(meqPerPercent - 0.178)).toBeLessThan(0.001);
    expect(leafBaseMeqPerG.tea).toBeCloseTo(2 * meqPerPercent * 0.61, 2);
  });

  it('judgement: 4 min at 82 °C bring out 0.85 of it', () => {
    expect(leafBaseExtractedRatio(4.28)).toBeCloseTo(0.85, 9);
    expect(leafBaseExtractedRatio(0)).toBe(0);
  });

  it('refuses a negative base', () => {
    expect(() => leafBase(-1)).toThrow(RangeError);
    expect(() => leafBaseExtractedRatio(Number.NaN)).toThrow(RangeError);
  });
});
