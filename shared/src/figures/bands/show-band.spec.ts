import { describe, expect, it } from 'vitest';
import { band, sure } from './band.js';
import { showBand, showPhBand } from './show-band.js';

describe('showBand', () => {
  it.each([
    [band(86, 139, 192, 'judged'), '140 (86–190)'],
    [band(3.7, 6.1, 9.4, 'judged'), '6.1 (3.7–9.4)'],
    [band(0.003, 0.014, 0.05, 'judged'), '0.0030–0.050'],
    [sure(109.7), '110'],
  ])('%j is %s', (one, text) => {
    expect(showBand(one)).toBe(text);
  });

  it('shows a pH with two decimals', () => {
    expect(showPhBand({ low: 3.53, value: 3.78, high: 4.09 })).toBe('3.78 (3.53–4.09)');
    expect(showPhBand({ low: 3.08, value: 3.08, high: 3.08 })).toBe('3.08');
  });
});
