import { describe, expect, it } from 'vitest';
import { band, sure } from './band.js';
import { showBand, showPhBand } from './show-band.js';

describe('showBand', () => {
  it.each([
    [band(86, 139, 192, 'judged'), '140 (86–190)'],
    [band(3.7, 6.1, 9.4, 'judged'), '6.1 (3.7–9.4)'],
    [band(0.003, 0.014, 0.05, 'judged'), '0.0030–0.050'],
    [sure(109.7), '110'],
    [sure(0), '0'],
    [band(109.6, 109.7, 110.2, 'solid'), '110'],
    [band(0, 0.05, 0.19, 'judged'), '0.050 (0–0.19)'],
    [band(-0.3, 0.2, 0.7, 'measured'), '0.20 (−0.30 to 0.70)'],
    [band(-12, -6, -3, 'measured'), '−6.0 (−12 to −3.0)'],
    [band(1.2e-7, 1.4e-7, 2e-7, 'judged'), '0.00000014 (0.00000012–0.00000020)'],
    [band(1.1e6, 1.24e6, 1.4e6, 'judged'), '1200000 (1100000–1400000)'],
  ])('%j is %s', (one, text) => {
    expect(showBand(one)).toBe(text);
  });

  it('shows a pH with two decimals', () => {
    expect(showPhBand({ low: 3.53, value: 3.78, high: 4.09 })).toBe('3.78 (3.53–4.09)');
    expect(showPhBand({ low: 3.081, value: 3.082, high: 3.084 })).toBe('3.08');
    expect(() => showPhBand({ low: 3, value: Number.NaN, high: 4 })).toThrow(RangeError);
    expect(showPhBand({ low: 3.08, value: 3.08, high: 3.08 })).toBe('3.08');
  });
});
