import { describe, expect, it } from 'vitest';
import { settledStrength } from './settle.js';

describe('settledStrength', () => {
  it('settles at once when it can', () => {
    expect(settledStrength((x) => 0.1 + 0.2 * x, 0, 1)).toBeCloseTo(0.125, 9);
  });

  it('settles as well where plain iteration swings for ever', () => {
    let calls = 0;
    const swinging = (x: number) => {
      calls += 1;
      return 1 - x;
    };
    expect(settledStrength(swinging, 0, 1)).toBeCloseTo(0.5, 9);
    expect(calls).toBeLessThanOrEqual(100);
  });
});
