import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coolingExponent, powerLawDurationS, powerLawTempC } from './power-law-cooling.js';

const pot = { fromC: 83, referenceC: 22, fallCPerS: 0.013455 };

describe('power-law cooling', () => {
  it.each([
    [1, 469.4],
    [1.25, 475.5],
    [1.4, 479.3],
    [2.2, 499.8],
    [2.4, 505.1],
  ])('closed form, computed: 83 to 77 °C with n = %s takes %s s', (exponent, durationS) => {
    const answer = powerLawDurationS({ ...pot, exponent }, 77) ?? 0;
    expect(Math.abs(answer / durationS - 1)).toBeLessThan(0.003);
  });

  it('heat balance, computed: the full model takes 507 s, a straight line says 446, a power of 2.2 to 2.4 is within 8 s', () => {
    const steep = { ...pot, fallCPerS: 0.01346 };
    expect(Math.abs(6 / steep.fallCPerS - 446)).toBeLessThan(0.5);
    for (const exponent of [2.2, 2.4]) {
      expect(Math.abs((powerLawDurationS({ ...steep, exponent }, 77) ?? 0) - 507)).toBeLessThan(8);
    }
  });

  it('comes back from temperature to time', () => {
    const exponents = fc.constantFrom(...Object.values(coolingExponent));
    fc.assert(
      fc.property(exponents, fc.double({ min: 1, max: 5000, noNaN: true }), (exponent, durationS) => {
        const cooling = { ...pot, exponent };
        const back = powerLawDurationS(cooling, powerLawTempC(cooling, durationS)) ?? 0;
        expect(back / durationS).toBeCloseTo(1, 8);
      }),
    );
  });

  it('never reaches the reference, nor what is above the start', () => {
    const cooling = { ...pot, exponent: 1.25 };
    expect(powerLawDurationS(cooling, 22)).toBeNull();
    expect(powerLawDurationS(cooling, 90)).toBeNull();
    expect(powerLawDurationS({ ...cooling, fromC: 20 }, 15)).toBeNull();
    expect(powerLawDurationS(cooling, 83)).toBe(0);
  });

  it('refuses a rate that is not a fall, and a start below the reference', () => {
    expect(() => powerLawDurationS({ ...pot, fallCPerS: 0, exponent: 1 }, 77)).toThrow(RangeError);
    expect(() => powerLawDurationS({ ...pot, exponent: 0.5 }, 77)).toThrow(RangeError);
    expect(() => powerLawTempC({ ...pot, fromC: 20, exponent: 1 }, 60)).toThrow(RangeError);
  });
});
