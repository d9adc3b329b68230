import { describe, expect, it } from 'vitest';
import { heatCapacityJPerK } from './heat-capacity.js';

describe('heatCapacityJPerK', () => {
  it('adds water and steel (Engineers Edge property table)', () => {
    const parts = [{ massG: 10_000, material: 'water' } as const, { massG: 2500, material: 'stainlessSteel' } as const];
    expect(heatCapacityJPerK(parts)).toBeCloseTo(43_110, 6);
    expect(heatCapacityJPerK([])).toBe(0);
  });

  it('refuses a negative mass and an unknown metal', () => {
    expect(() => heatCapacityJPerK([{ massG: -1, material: 'water' }])).toThrow(RangeError);
    expect(() => heatCapacityJPerK([{ massG: 1, material: 'gold' as 'water' }])).toThrow(/one of water, copper/);
  });
});
