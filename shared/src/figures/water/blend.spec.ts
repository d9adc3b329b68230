import { describe, expect, it } from 'vitest';
import { blendedWater } from './blend.js';
import { pureWater } from './ions.js';

const tap = { ca: 80, mg: 10, na: 20, k: 2, cl: 40, so4: 50, hco3: 220 };

describe('blendedWater', () => {
  it('mass balance: a quarter of tap water in pure water is a quarter of every ion', () => {
    const mix = blendedWater([
      { water: tap, volumeL: 5 },
      { water: pureWater, volumeL: 15 },
    ]);
    expect(mix).toEqual({ ca: 20, mg: 2.5, na: 5, k: 0.5, cl: 10, so4: 12.5, hco3: 55 });
  });

  it('refuses no water', () => {
    expect(() => blendedWater([])).toThrow(RangeError);
    expect(() => blendedWater([{ water: tap, volumeL: -1 }])).toThrow(RangeError);
  });
});
