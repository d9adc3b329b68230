import { describe, expect, it } from 'vitest';
import { gaps } from './gaps.js';

const at = (second: number, tempC: number | null = 80) => ({ atMs: second * 1000, tempC });

describe('gaps', () => {
  it('finds spans longer than the limit', () => {
    expect(gaps([at(0), at(1), at(31), at(32)], 3)).toEqual([{ fromMs: 1000, toMs: 31_000 }]);
  });

  it('does not count a span of exactly the limit', () => {
    expect(gaps([at(0), at(3)], 3)).toEqual([]);
  });

  it('does not let a missing reading end a gap', () => {
    expect(gaps([at(0), at(2, null), at(4, null), at(6)], 3)).toEqual([{ fromMs: 0, toMs: 6000 }]);
  });

  it('says nothing of what lies before the first and after the last temperature', () => {
    expect(gaps([at(0, null), at(60), at(120, null)], 3)).toEqual([]);
    expect(gaps([], 3)).toEqual([]);
  });
});
