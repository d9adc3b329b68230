import { describe, expect, it } from 'vitest';
import { boilOffKgPerH } from './boil-off.js';

describe('boilOffKgPerH', () => {
  it('energy balance, computed: 0.9 of 2000 W less 500 W boils off 2.07 kg an hour', () => {
    expect(boilOffKgPerH({ usefulPowerW: 1800, sensibleLossW: 500, boilingC: 100 })).toBeCloseTo(2.07, 2);
  });

  it('boils nothing when the losses win, and refuses NaN', () => {
    expect(boilOffKgPerH({ usefulPowerW: 300, sensibleLossW: 500, boilingC: 100 })).toBe(0);
    expect(() => boilOffKgPerH({ usefulPowerW: Number.NaN, sensibleLossW: 0, boilingC: 100 })).toThrow(RangeError);
  });
});
