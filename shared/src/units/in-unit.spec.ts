import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromUnit, inUnit } from './index.js';

const kinds = [
  ['temperature', 'C'],
  ['temperature', 'F'],
  ['mass', 'g'],
  ['mass', 'oz'],
  ['volume', 'L'],
  ['volume', 'gal'],
  ['pressure', 'kPa'],
  ['pressure', 'bar'],
  ['pressure', 'psi'],
] as const;

describe('a person’s units', () => {
  it.each(kinds)('%s in %s comes back as it was typed', (kind, unit) => {
    fc.assert(
      fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), (typed) => {
        const back = inUnit(kind, fromUnit(kind, typed, unit as never), unit as never);
        expect(Math.abs(back - typed)).toBeLessThan(1e-9 * Math.max(1, Math.abs(typed)));
      }),
    );
  });

  it('knows the points that people know', () => {
    expect(fromUnit('temperature', 170, 'F')).toBeCloseTo(76.67, 2);
    expect(inUnit('pressure', 72.7, 'psi')).toBeCloseTo(10.54, 2);
    expect(inUnit('volume', 18.927, 'gal')).toBeCloseTo(5, 3);
    expect(inUnit('mass', 12.3, 'g')).toBe(12.3);
  });
});
