import { describe, expect, it } from 'vitest';
import { lineDrop, lineFlowMlPerS, lineLengthM } from './serving-line.js';

const line = { gaugeKPa: 86.7, riseM: 0.5, boreMm: 4.7625, fittings: 2.5 };

describe('serving line', () => {
  it.each([
    [4.7625, 36.5],
    [6.35, 9.32],
    [7.94, 3.23],
  ])('White, Fluid Mechanics (from memory): 59.15 mL/s through %s mm eats %s kPa/m', (boreMm, kPaPerM) => {
    expect(Math.abs(lineDrop(59.15, boreMm).kPaPerM / kPaPerM - 1)).toBeLessThan(0.015);
  });

  it('White, Fluid Mechanics (from memory): Re 10 090 at 59.15 mL/s in 4.7625 mm', () => {
    expect(Math.abs(lineDrop(59.15, 4.7625).reynolds / 10_090 - 1)).toBeLessThan(0.015);
    expect(lineDrop(59.15, 4.7625).uncertain).toBe(false);
    expect(lineDrop(18, 4.7625).uncertain).toBe(true);
  });

  it('Hagen-Poiseuille below Re 2300: 128 mu L Q over pi d^4', () => {
    const direct = (128 * 1.567e-3 * 5e-6) / (Math.PI * 0.0047625 ** 4) / 1000;
    expect(lineDrop(5, 4.7625).kPaPerM).toBeCloseTo(direct, 9);
  });

  it('White, Fluid Mechanics (from memory): tables of the trade are not this; a bore of 4.0 mm is 2.3 times', () => {
    const psiPerFoot = (boreMm: number) => lineDrop(59.15, boreMm).kPaPerM * 0.3048 * 0.1450377;
    expect(Math.abs(0.85 / psiPerFoot(6.35) - 2.1)).toBeLessThan(0.1);
    expect(Math.abs(0.1 / psiPerFoot(7.94) - 0.7)).toBeLessThan(0.05);
    expect(Math.abs(lineDrop(59.15, 4).kPaPerM / lineDrop(59.15, 4.7625).kPaPerM - 2.3)).toBeLessThan(0.05);
  });

  it.each([
    [59.15, 1.86],
    [30, 7.03],
  ])('White, Fluid Mechanics (from memory): %s mL/s takes %s m', (flow, lengthM) => {
    expect(Math.abs((lineLengthM(line, flow) ?? 0) / lengthM - 1)).toBeLessThan(0.015);
  });

  it('White, Fluid Mechanics (from memory): 3 m give 46.9 mL/s', () => {
    expect(Math.abs((lineFlowMlPerS(line, 3) ?? 0) / 46.9 - 1)).toBeLessThan(0.015);
  });

  it('learns from a timed pour, and says when nothing flows', () => {
    expect(lineLengthM({ ...line, lineFactor: 2 }, 30)).toBeCloseTo((lineLengthM(line, 30) ?? 0) / 2, 9);
    expect(lineFlowMlPerS({ ...line, gaugeKPa: 4 }, 3)).toBeNull();
    expect(lineLengthM({ ...line, gaugeKPa: 4 }, 30)).toBeNull();
  });

  it('refuses a bore of 0', () => {
    expect(() => lineDrop(30, 0)).toThrow(RangeError);
    expect(() => lineFlowMlPerS(line, 0)).toThrow(RangeError);
  });
});
