import { describe, expect, it } from 'vitest';
import { alphaTodayWords } from './alpha-today.ts';

const hops = { alphaPercent: 10, oilMlPer100G: null, harvestedOn: '2026-01-01', storageIndex: null };

describe(alphaTodayWords, () => {
  it('goes by the storage index where there is one', () => {
    expect(alphaTodayWords({ ...hops, storageIndex: 0.28 }, '2026-06-18')).toMatch(/^9\.5 % .*by its storage index$/);
  });

  it('goes by the age otherwise, with the band of warm and cold keeping', () => {
    expect(alphaTodayWords(hops, '2026-06-18')).toBe('8.2 % (7.6 to 8.6), by its age');
  });

  it('does not guess without either, nor from a harvest that is still to come', () => {
    expect(alphaTodayWords({ ...hops, harvestedOn: null }, '2026-06-18')).toBeNull();
    expect(alphaTodayWords({ ...hops, harvestedOn: '2026-09-01' }, '2026-06-18')).toBe('10 %, by its age');
  });
});
