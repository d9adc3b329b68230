import { describe, expect, it } from 'vitest';
import { chillerConstantPerS, chillerFallCPerS, coilEffectiveness, coolantOutC } from './chiller.js';
import { newtonDurationS } from './newton.js';

const chiller = { transferWPerK: 240, coolantKgPerS: 0.1, coolantInC: 15, heatCapacityJPerK: 40_000 };

describe('coil chiller in a stirred vessel', () => {
  it('exchanger effectiveness, computed: 0.4364', () => {
    expect(coilEffectiveness(240, 0.1)).toBeCloseTo(0.4364, 4);
  });

  it.each([
    [82, 18.36],
    [60, 12.33],
    [40, 6.85],
  ])('exchanger effectiveness, computed: at %s °C it falls %s K a minute', (tempC, rate) => {
    expect(chillerFallCPerS(chiller, tempC) * 60).toBeCloseTo(rate, 2);
  });

  it('exchanger effectiveness, computed: 82 to 25 °C in 416.5 s', () => {
    expect(newtonDurationS(82, 25, 15, chillerConstantPerS(chiller))).toBeCloseTo(416.5, 1);
  });

  it('cannot beat its own coolant flow, and the coolant leaves below the liquid', () => {
    const huge = { ...chiller, transferWPerK: 1e6 };
    expect(chillerFallCPerS(huge, 82)).toBeCloseTo((0.1 * 4186 * (82 - 15)) / 40_000, 9);
    expect(coolantOutC(huge, 82)).toBeCloseTo(82, 9);
    expect(coolantOutC(chiller, 82)).toBeCloseTo(15 + 0.4364 * 67, 1);
  });

  it('refuses a closed tap and NaN', () => {
    expect(() => coilEffectiveness(240, 0)).toThrow(RangeError);
    expect(() => chillerFallCPerS(chiller, Number.NaN)).toThrow(RangeError);
    expect(() => chillerConstantPerS({ ...chiller, heatCapacityJPerK: 0 })).toThrow(RangeError);
  });
});
