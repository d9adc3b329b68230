import { describe, expect, it } from 'vitest';
import { caffeineContent, servingCaffeineMg, steepedCaffeineMgPerL } from './caffeine.js';

describe('caffeine', () => {
  it('J. Tea Sci. Res. 14, 19 and judgement: 5 g/L of white tea, 0.885 of 0.90 out, are 139 mg/L', () => {
    const { value } = caffeineContent('white');
    const mgPerL = steepedCaffeineMgPerL({ doseGPerL: 5, contentMgPerG: value, extractedRatio: 0.885 * 0.9 });
    expect(mgPerL).toBeCloseTo(139, 0);
    expect(servingCaffeineMg(mgPerL, 355)).toBeCloseTo(50, -1);
  });

  it('Stander 2019: rooibos has none', () => {
    expect(caffeineContent('herbal')).toEqual({ low: 0, value: 0, high: 0 });
  });

  it('refuses a share in percent', () => {
    expect(() => steepedCaffeineMgPerL({ doseGPerL: 5, contentMgPerG: 35, extractedRatio: 80 })).toThrow(RangeError);
    expect(() => caffeineContent('cola' as 'black')).toThrow(/one of white/);
  });
});
