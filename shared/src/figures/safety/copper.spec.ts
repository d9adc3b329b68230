import { describe, expect, it } from 'vitest';
import { tooAcidForCopper } from './copper.js';

describe('tooAcidForCopper', () => {
  it('FDA Food Code 4-101.14: below pH 6', () => {
    expect(tooAcidForCopper(5.5)).toBe(true);
    expect(tooAcidForCopper(6)).toBe(false);
  });

  it('refuses a pH of 15', () => {
    expect(() => tooAcidForCopper(15)).toThrow(RangeError);
  });
});
