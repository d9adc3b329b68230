import { describe, expect, it } from 'vitest';
import { counterflowEffectiveness, counterflowOutC } from './counterflow.js';

describe('counterflow exchanger', () => {
  it.each([
    [1.5, 0.8, 0.636],
    [2, 1, 0.667],
  ])('textbook effectiveness: NTU %s at flow ratio %s is %s', (ntu, ratio, share) => {
    expect(counterflowEffectiveness(ntu, ratio)).toBeCloseTo(share, 3);
  });

  it('has no seam at equal flows', () => {
    expect(counterflowEffectiveness(2, 1 - 1e-7)).toBeCloseTo(2 / 3, 6);
  });

  it('cools the drink toward the coolant', () => {
    const pass = { hotInC: 80, coolantInC: 15, effectiveness: 0.8, smallerOverHotFlow: 1 };
    expect(counterflowOutC(pass)).toBeCloseTo(28, 9);
  });

  it('refuses a flow ratio above 1', () => {
    expect(() => counterflowEffectiveness(1, 1.2)).toThrow(RangeError);
  });
});
