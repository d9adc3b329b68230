import { describe, expect, it } from 'vitest';
import { boilingPointAtAltitudeC } from './boiling-point.js';
import { correctedTempC, correctionUncertaintyK, twoPointCorrection } from './two-point-correction.js';

describe('two-point correction', () => {
  it('straight line through ice and IAPWS SR1-86 boil at 500 m: 82.0 read is 82.28 °C', () => {
    const result = twoPointCorrection(0.4, 97.9, boilingPointAtAltitudeC(500));
    expect(result.kind).toBe('accepted');
    expect(Math.abs(correctedTempC(82, result.correction) - 82.28)).toBeLessThan(0.06);
    expect(correctedTempC(0.4, result.correction)).toBeCloseTo(0, 12);
  });

  it('refuses a wrong probe or a bad bath, and says which', () => {
    expect(twoPointCorrection(0.4, 93, 99.97)).toMatchObject({ kind: 'refused', reason: 'slope' });
    expect(twoPointCorrection(3, 102.9, 99.97)).toMatchObject({ kind: 'refused', reason: 'offset' });
    expect(twoPointCorrection(97.9, 0.4, 99.97)).toMatchObject({ kind: 'refused', reason: 'slope' });
  });

  it('carries the uncertainty of the bath that is nearer', () => {
    const baths = { boilC: 100, iceK: 0.1, boilK: 0.2 };
    expect(correctionUncertaintyK(0, baths)).toBeCloseTo(0.1, 12);
    expect(correctionUncertaintyK(100, baths)).toBeCloseTo(0.2, 12);
    expect(correctionUncertaintyK(50, baths)).toBeCloseTo(Math.hypot(0.05, 0.1), 12);
  });

  it('refuses NaN and two equal readings', () => {
    expect(() => twoPointCorrection(Number.NaN, 98, 99)).toThrow(RangeError);
    expect(() => twoPointCorrection(20, 20, 99)).toThrow(/Read ice and boil again/);
  });
});
