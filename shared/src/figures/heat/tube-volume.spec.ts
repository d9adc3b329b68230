import { describe, expect, it } from 'vitest';
import { tubeVolumeL } from './tube-volume.js';

describe('tubeVolumeL', () => {
  it('computed: 7.6 m of 7.9 mm bore holds 0.37 L', () => {
    expect(tubeVolumeL(7.6, 7.9)).toBeCloseTo(0.37, 2);
  });

  it('refuses a negative length', () => {
    expect(() => tubeVolumeL(-1, 8)).toThrow(RangeError);
  });
});
