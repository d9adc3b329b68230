import { describe, expect, it } from 'vitest';
import { iceMassG } from './ice-mass.js';

describe('iceMassG', () => {
  it('energy balance (heat of fusion from memory): 10 kg from 60 to 10 °C takes 5.58 kg', () => {
    expect(iceMassG(10_000, 60, 10)).toBeCloseTo(5580, -1);
  });

  it('refuses a target above the start, and one at the ice point', () => {
    expect(() => iceMassG(1000, 20, 30)).toThrow(RangeError);
    expect(() => iceMassG(1000, 20, 0)).toThrow(RangeError);
  });
});
