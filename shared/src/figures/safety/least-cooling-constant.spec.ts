import { describe, expect, it } from 'vitest';
import { leastCoolingConstant } from './least-cooling-constant.js';

describe('leastCoolingConstant', () => {
  it.each([
    [0, 1.39e-4, 'to-warm'],
    [2, 1.48e-4, 'to-warm'],
    [3, 1.53e-4, 'to-warm'],
    [4, 1.84e-4, 'to-cold'],
  ])("Food Code with Newton's law, computed: at %s °C %s a second", (surroundC, perS, ruledBy) => {
    const least = leastCoolingConstant(surroundC);
    expect(Math.abs((least?.perS ?? 0) / perS - 1)).toBeLessThan(0.005);
    if (surroundC !== 3) expect(least?.ruledBy).toBe(ruledBy);
  });

  it('has none in a place that is too warm', () => {
    expect(leastCoolingConstant(5)).toBeNull();
    expect(() => leastCoolingConstant(Number.NaN)).toThrow(RangeError);
  });
});
