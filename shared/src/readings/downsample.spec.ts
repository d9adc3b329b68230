import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { downsampleMinMax } from './downsample.js';

const series = (count: number) => Array.from({ length: count }, (_, i) => ({ atMs: i * 1000, tempC: 80 - i * 0.01 }));

const anySeries = fc
  .array(
    fc.record({
      stepMs: fc.integer({ min: 0, max: 60_000 }),
      tempC: fc.option(fc.double({ min: -20, max: 115, noNaN: true })),
    }),
  )
  .map((rows) => {
    let atMs = 0;
    return rows.map(({ stepMs, tempC }) => ({ atMs: (atMs += stepMs), tempC }));
  });

describe('downsampleMinMax', () => {
  it('keeps a spike of one sample', () => {
    const readings = series(10_000);
    readings[4321] = { atMs: 4_321_000, tempC: 99 };
    const thin = downsampleMinMax(readings, 100);
    expect(thin.length).toBeLessThanOrEqual(202);
    expect(thin).toContainEqual({ atMs: 4_321_000, tempC: 99 });
  });

  it('keeps a dropout', () => {
    const readings: { atMs: number; tempC: number | null }[] = series(1000);
    readings[500] = { atMs: 500_000, tempC: null };
    expect(downsampleMinMax(readings, 20)).toContainEqual({ atMs: 500_000, tempC: null });
  });

  it('gives few readings back as they are', () => {
    expect(downsampleMinMax(series(20), 10)).toEqual(series(20));
    expect(downsampleMinMax([], 10)).toEqual([]);
  });

  it('refuses a senseless number of buckets', () => {
    expect(() => downsampleMinMax([], 0)).toThrow(RangeError);
    expect(() => downsampleMinMax([], 1.5)).toThrow(RangeError);
  });

  it('keeps order, ends and extremes of anything, and invents nothing', () => {
    fc.assert(
      fc.property(anySeries, fc.integer({ min: 1, max: 20 }), (readings, buckets) => {
        const thin = downsampleMinMax(readings, buckets);
        expect(thin.length).toBeLessThanOrEqual(Math.max(3 * buckets + 2, 2 * buckets));
        expect(thin.every((reading) => readings.includes(reading))).toBe(true);
        expect(thin.every((reading, i) => i === 0 || reading.atMs >= thin[i - 1]!.atMs)).toBe(true);
        expect(thin[0]).toBe(readings[0]);
        expect(thin.at(-1)).toBe(readings.at(-1));
        const temps = (rows: typeof readings) => rows.flatMap(({ tempC }) => (tempC === null ? [] : [tempC]));
        expect(Math.max(...temps(thin))).toBe(Math.max(...temps(readings)));
        expect(Math.min(...temps(thin))).toBe(Math.min(...temps(readings)));
      }),
    );
  });
});
