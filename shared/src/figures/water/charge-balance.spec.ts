import { describe, expect, it } from 'vitest';
import { chargeBalance } from './charge-balance.js';
import { pureWater } from './ions.js';

describe('chargeBalance', () => {
  it('electroneutrality: sodium chloride balances, and a missing anion is flagged or refused', () => {
    const salt = { ...pureWater, na: 22.99, cl: 35.45 };
    expect(chargeBalance(salt)).toMatchObject({ cationsMeqPerL: 1, anionsMeqPerL: 1, verdict: 'balanced' });
    expect(chargeBalance({ ...salt, cl: 0.88 * 35.45 })).toMatchObject({ verdict: 'flagged' });
    expect(chargeBalance({ ...salt, cl: 0.5 * 35.45 })).toMatchObject({ verdict: 'refused' });
    expect(chargeBalance({ ...salt, na: 0.5 * 22.99 }).imbalancePercent).toBeCloseTo(-100 / 3, 9);
  });

  it('finds water without ions balanced', () => {
    expect(chargeBalance(pureWater)).toMatchObject({ imbalancePercent: 0, verdict: 'balanced' });
  });
});
