import { describe, expect, it } from 'vitest';
import { checkedCurve, curveBetween, curveFromReadings, curveTempC } from './temperature-curve.js';

const curve = [
  { atMs: 0, tempC: 80 },
  { atMs: 100, tempC: 70 },
  { atMs: 100, tempC: 68 },
  { atMs: 300, tempC: 60 },
];

describe('temperature curve', () => {
  it.each([
    [-1, null],
    [0, 80],
    [50, 75],
    [100, 68],
    [200, 64],
    [300, 60],
    [301, null],
  ])('at %s ms it is %s °C', (atMs, tempC) => {
    expect(curveTempC(curve, atMs)).toBe(tempC);
  });

  it('is cut at both ends', () => {
    expect(curveBetween(curve, 50, 200)).toEqual([
      { atMs: 50, tempC: 75 },
      { atMs: 100, tempC: 70 },
      { atMs: 100, tempC: 68 },
      { atMs: 200, tempC: 64 },
    ]);
    expect(curveBetween(curve, 250, 900)).toEqual([
      { atMs: 250, tempC: 62 },
      { atMs: 300, tempC: 60 },
    ]);
    expect(curveBetween([], 0, 1)).toEqual([]);
  });

  it('comes from readings in any order, without those that have no signal', () => {
    const readings = [
      { atMs: 20, tempC: 61 },
      { atMs: 10, tempC: null },
      { atMs: 0, tempC: 62 },
    ];
    expect(curveFromReadings(readings)).toEqual([
      { atMs: 0, tempC: 62 },
      { atMs: 20, tempC: 61 },
    ]);
    expect(() => curveFromReadings([{ atMs: 0, tempC: Number.NaN }])).toThrow(RangeError);
  });

  it('refuses holes and disorder, and two clocks in one', () => {
    const clocks = [
      { atMs: 0, tempC: 60 },
      { atMs: 1.8e12, tempC: 20 },
    ];
    expect(() => checkedCurve(clocks)).toThrow(/by one clock/);
    expect(checkedCurve(curve)).toBe(curve);
    expect(() => checkedCurve([{ atMs: 0, tempC: Number.NaN }])).toThrow(RangeError);
    expect(() => checkedCurve([{ atMs: 9, tempC: 1 }, ...curve])).toThrow(/Sort its points/);
    expect(() => curveTempC(curve, Number.NaN)).toThrow(RangeError);
  });
});
