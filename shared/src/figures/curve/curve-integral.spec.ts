import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { curveIntegralMin } from './curve-integral.js';

const line = [
  { atMs: 0, tempC: 90 },
  { atMs: 600_000, tempC: 30 },
];

describe('curveIntegralMin', () => {
  it('is exact for what one can do by hand', () => {
    expect(curveIntegralMin(line, () => 1)).toBeCloseTo(10, 12);
    expect(curveIntegralMin(line, (tempC) => tempC)).toBeCloseTo(600, 9);
    const grows = curveIntegralMin(line, (tempC) => Math.exp(tempC / 8));
    expect(grows / ((10 * 8 * (Math.exp(90 / 8) - Math.exp(30 / 8))) / 60)).toBeCloseTo(1, 5);
  });

  it('does not care where a straight line is cut, nor about a jump in no time', () => {
    const rate = (tempC: number) => Math.exp(tempC / 10);
    const whole = curveIntegralMin(line, rate);
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 20 }), (cuts) => {
        const inner = cuts.toSorted((a, b) => a - b).map((part) => ({ atMs: 600_000 * part, tempC: 90 - 60 * part }));
        expect(curveIntegralMin([line[0]!, ...inner, line[1]!], rate) / whole).toBeCloseTo(1, 5);
      }),
    );
    const jump = [line[0]!, line[1]!, { atMs: 600_000, tempC: 90 }, { atMs: 660_000, tempC: 90 }];
    expect(curveIntegralMin(jump, rate)).toBeCloseTo(whole + rate(90), 1);
  });

  it('is nothing without time', () => {
    expect(curveIntegralMin([], () => 1)).toBe(0);
    expect(curveIntegralMin([{ atMs: 5, tempC: 80 }], () => 1)).toBe(0);
  });
});
