import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { bisect } from './bisect.js';

describe('bisect', () => {
  it('finds the root of any rising or falling line', () => {
    fc.assert(
      fc.property(fc.double({ min: -9, max: 9, noNaN: true }), fc.boolean(), (root, rising) => {
        const sign = rising ? 1 : -1;
        expect(bisect((x) => sign * (x - root), -10, 10, rising)).toBeCloseTo(root, 9);
      }),
    );
  });

  it('stops at an end when there is no root', () => {
    expect(bisect(() => -1, 0, 1, true)).toBeCloseTo(1, 12);
    expect(bisect(() => 1, 0, 1, true)).toBeCloseTo(0, 12);
  });
});
