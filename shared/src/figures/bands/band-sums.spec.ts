import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { band, type Band } from './band.js';
import { addBands, divideBands, mapBand, multiplyBands, subtractBands } from './band-sums.js';

const bands = fc
  .tuple(
    fc.double({ min: -50, max: 50, noNaN: true }),
    fc.double({ min: 0, max: 9, noNaN: true }),
    fc.double({ min: 0, max: 9, noNaN: true }),
  )
  .map(([value, down, up]) => band(value - down, value, value + up, 'measured'));
const inside = (one: Band, share: number) => one.low + (one.high - one.low) * share;

describe('sums of bands', () => {
  it('hold whatever their parts can be', () => {
    const share = fc.double({ min: 0, max: 1, noNaN: true });
    fc.assert(
      fc.property(bands, bands, share, share, (a, b, s, t) => {
        const [x, y] = [inside(a, s), inside(b, t)];
        const holds = (sum: Band, value: number) => value >= sum.low - 1e-9 && value <= sum.high + 1e-9;
        expect(holds(addBands(a, b), x + y)).toBe(true);
        expect(holds(subtractBands(a, b), x - y)).toBe(true);
        expect(holds(multiplyBands(a, b), x * y)).toBe(true);
        if (b.low > 0.01) expect(holds(divideBands(a, b), x / y)).toBe(true);
        expect(
          holds(
            mapBand(a, (v) => -(v ** 3)),
            -(x ** 3),
          ),
        ).toBe(true);
      }),
    );
  });

  it('keep the weaker grade', () => {
    expect(addBands(band(1, 2, 3, 'solid'), band(1, 1, 1, 'judged'))).toEqual({
      low: 2,
      value: 3,
      high: 4,
      grade: 'judged',
    });
  });

  it('refuse to divide by what may be nothing', () => {
    expect(() => divideBands(band(1, 1, 1, 'solid'), band(-1, 1, 2, 'solid'))).toThrow(/must not span 0/);
  });
});
