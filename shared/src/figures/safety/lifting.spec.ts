import { describe, expect, it } from 'vitest';
import { kegMassKg, liftingIndex, recommendedLiftKg } from './lifting.js';

const easy = { reachCm: 25, heightCm: 75, travelCm: 25, grip: 'good' } as const;
const hard = { reachCm: 40, heightCm: 30, travelCm: 70, grip: 'fair' } as const;

describe('lifting', () => {
  it('NIOSH lifting equation (from memory): 23.0 kg at best, 10.446 kg from low and far', () => {
    expect(recommendedLiftKg(easy)).toBeCloseTo(23, 9);
    expect(Math.abs(recommendedLiftKg(hard) - 10.446)).toBeLessThan(0.05);
  });

  it('a full 5 US gal keg weighs 23.23 kg (tare from memory): two people, unless it stands perfectly', () => {
    const loadKg = kegMassKg({ volumeL: 18.93, tareKg: 4.3 });
    expect(loadKg).toBeCloseTo(23.23, 2);
    expect(liftingIndex(loadKg, easy)).toBeGreaterThan(1);
    expect(liftingIndex(loadKg, { ...hard, grip: 'poor' })).toBeGreaterThan(2);
  });

  it('counts a near load as 25 cm, and refuses an arm of a metre', () => {
    expect(recommendedLiftKg({ ...easy, reachCm: 5, travelCm: 0 })).toBeCloseTo(23, 9);
    expect(() => recommendedLiftKg({ ...easy, reachCm: 100 })).toThrow(RangeError);
  });
});
