import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { newtonConstantPerS, newtonDurationS, newtonTempC } from './newton.js';

describe('Newton cooling', () => {
  it("Newton's law, computed: from 85 °C in a room of 22 °C with k = 2.0e-4", () => {
    expect(newtonTempC(85, 22, 2e-4, 600)).toBeCloseTo(77.88, 2);
    expect(newtonDurationS(85, 77, 22, 2e-4)).toBeCloseTo(679, 0);
  });

  it.each([
    [60, 40, 235.1],
    [60, 21, 806],
  ])("Newton's law, computed: %s to %s °C toward 15 °C with k = 1/400 takes %s s", (fromC, toC, durationS) => {
    expect(newtonDurationS(fromC, toC, 15, 1 / 400)).toBeCloseTo(durationS, 1);
  });

  it('never reaches what is not on its way', () => {
    expect(newtonDurationS(60, 10, 15, 0.01)).toBeNull();
    expect(newtonDurationS(60, 15, 15, 0.01)).toBeNull();
    expect(newtonDurationS(60, 70, 15, 0.01)).toBeNull();
    expect(newtonDurationS(60, 60, 15, 0.01)).toBe(0);
    expect(newtonDurationS(5, 10, 22, 0.01)).toBeGreaterThan(0);
    expect(newtonConstantPerS(60, 70, 15, 60)).toBeNull();
  });

  it('comes back from temperature to time and to the constant', () => {
    const inputs = fc.record({
      fromC: fc.double({ min: 30, max: 100, noNaN: true }),
      surroundC: fc.double({ min: 0, max: 25, noNaN: true }),
      kPerS: fc.double({ min: 1e-5, max: 1e-2, noNaN: true }),
      part: fc.double({ min: 0.05, max: 2, noNaN: true }),
    });
    fc.assert(
      fc.property(inputs, ({ fromC, surroundC, kPerS, part }) => {
        const durationS = part / kPerS;
        const tempC = newtonTempC(fromC, surroundC, kPerS, durationS);
        expect((newtonDurationS(fromC, tempC, surroundC, kPerS) ?? 0) / durationS).toBeCloseTo(1, 8);
        expect((newtonConstantPerS(fromC, tempC, surroundC, durationS) ?? 0) / kPerS).toBeCloseTo(1, 8);
      }),
    );
  });

  it('refuses NaN, and a constant of 0 or less', () => {
    expect(() => newtonTempC(Number.NaN, 22, 1e-4, 60)).toThrow(RangeError);
    expect(() => newtonDurationS(85, 77, 22, 0)).toThrow(RangeError);
    expect(() => newtonConstantPerS(85, 77, 22, 0)).toThrow(RangeError);
  });
});
