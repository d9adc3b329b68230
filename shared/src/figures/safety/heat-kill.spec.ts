import { describe, expect, it } from 'vitest';
import { lethalityMin, pasteurisationUnits } from './heat-kill.js';

const line = (fromC: number, toC: number, minutes: number) => [
  { atMs: 0, tempC: fromC },
  { atMs: minutes * 60_000, tempC: toC },
];

describe('heat kill', () => {
  it.each([
    [60, 60, 10, 10],
    [72, 72, 0.25, 13.35],
    [67, 67, 10, 101.8],
    [66, 60, 10, 31.71],
  ])('MEBAK B-420.13.032: %s to %s °C in %s min is %s units', (fromC, toC, minutes, units) => {
    expect(Math.abs(pasteurisationUnits(line(fromC, toC, minutes)) / units - 1)).toBeLessThan(0.001);
  });

  it('MEBAK: 2 min at 80 °C is about 1500 units, and nothing counts below 50 °C', () => {
    expect(pasteurisationUnits(line(80, 80, 2))).toBeCloseTo(1510, -2);
    expect(pasteurisationUnits(line(49, 20, 600))).toBe(0);
    const all = pasteurisationUnits(line(60, 40, 20));
    expect(all).toBeCloseTo(pasteurisationUnits(line(60, 50, 10)), 9);
  });

  it.each([
    [80, 47.5],
    [121.1, 0.0037],
  ])('textbook lethality: 30 min at 82 °C are, at %s °C and z 10, %s min', (referenceC, minutes) => {
    expect(Math.abs(lethalityMin(line(82, 82, 30), { referenceC, zK: 10 }) / minutes - 1)).toBeLessThan(0.01);
  });

  it('is the same cut into pieces', () => {
    const pieces = Array.from({ length: 11 }, (_, i) => ({ atMs: i * 60_000, tempC: 66 - 0.6 * i }));
    expect(pasteurisationUnits(pieces)).toBeCloseTo(pasteurisationUnits(line(66, 60, 10)), 9);
  });

  it('refuses a z of 0', () => {
    expect(() => lethalityMin(line(82, 82, 30), { referenceC: 80, zK: 0 })).toThrow(RangeError);
  });
});
