import { describe, expect, it } from 'vitest';
import { massBalance } from './mass-balance.js';

const batch = { producedL: 40, onHandL: 18.5, deliveredL: 19, samplesL: 0.6, lossesL: 1.5 };

describe('massBalance', () => {
  it('volume balance: 99.0 % is good, a missing keg is not', () => {
    expect(massBalance(batch).percent).toBeCloseTo(99, 9);
    expect(massBalance(batch).good).toBe(true);
    expect(massBalance({ ...batch, onHandL: 0 }).good).toBe(false);
    expect(massBalance({ ...batch, deliveredL: 25 }).good).toBe(false);
  });

  it('refuses nothing produced', () => {
    expect(() => massBalance({ ...batch, producedL: 0 })).toThrow(RangeError);
  });
});
