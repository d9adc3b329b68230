import { describe, expect, it } from 'vitest';
import { monteCarlo, seededDraw, type Unsure } from './monte-carlo.js';

describe('seededDraw', () => {
  it('gives the same stream for the same seed, even from 0 to 1', () => {
    const [a, b, c] = [seededDraw(7), seededDraw(7), seededDraw(8)];
    const stream = Array.from({ length: 4000 }, () => a());
    expect(stream).toEqual(Array.from({ length: 4000 }, () => b()));
    expect(stream[0]).not.toBe(c());
    expect(Math.min(...stream)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...stream)).toBeLessThan(1);
    expect(stream.reduce((sum, x) => sum + x, 0) / 4000).toBeCloseTo(0.5, 1);
  });
});

describe('monteCarlo', () => {
  it.each<[Unsure, number, number, number]>([
    [{ kind: 'sure', value: 3 }, 3, 3, 3],
    [{ kind: 'even', low: 10, high: 20, grade: 'measured' }, 10.5, 15, 19.5],
    [{ kind: 'peaked', low: 20, value: 35, high: 50, grade: 'measured' }, 24.74, 35, 45.26],
    [{ kind: 'peaked', low: 5, value: 5, high: 5, grade: 'measured' }, 5, 5, 5],
    [{ kind: 'factor', value: 8, factor: 2, grade: 'judged' }, 4, 8, 16],
    [{ kind: 'spread', value: 5, spread: 1, grade: 'measured' }, 4, 5, 6],
  ])('finds the nine-in-ten range of %j', (input, low, value, high) => {
    const found = monteCarlo({ x: input }, ({ x }) => x, { runs: 4000 });
    expect(Math.abs(found.low / low - 1)).toBeLessThan(0.05);
    expect(Math.abs(found.value / value - 1)).toBeLessThan(0.05);
    expect(Math.abs(found.high / high - 1)).toBeLessThan(0.05);
  });

  it('never flickers, and keeps the weakest grade', () => {
    const inputs = { a: { kind: 'sure', value: 1 }, b: { kind: 'even', low: 0, high: 1, grade: 'judged' } } as const;
    const sum = () => monteCarlo(inputs, ({ a, b }) => a + b, { seed: 3 });
    expect(sum()).toEqual(sum());
    expect(sum().grade).toBe('judged');
  });

  it('refuses too few runs, and a figure that is no number', () => {
    expect(() => monteCarlo({}, () => 1, { runs: 10 })).toThrow(/more runs/);
    expect(() => monteCarlo({}, () => Number.NaN)).toThrow(/Check its inputs/);
  });

  it.each<Unsure>([
    { kind: 'even', low: 2, high: 1, grade: 'solid' },
    { kind: 'peaked', low: 1, value: 3, high: 2, grade: 'solid' },
    { kind: 'peaked', low: 1, value: Number.NaN, high: 2, grade: 'solid' },
    { kind: 'factor', value: 1, factor: 0.5, grade: 'solid' },
    { kind: 'spread', value: 1, spread: -1, grade: 'solid' },
  ])('refuses %j', (x) => {
    expect(() => monteCarlo({ x }, () => 1)).toThrow(RangeError);
  });

  it('carries a range across nothing', () => {
    const found = monteCarlo({ x: { kind: 'spread', value: 0, spread: 1, grade: 'measured' } }, ({ x }) => x);
    expect(found.low).toBeLessThan(-0.8);
    expect(found.high).toBeGreaterThan(0.8);
  });
});
