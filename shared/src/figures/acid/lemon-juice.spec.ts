import { describe, expect, it } from 'vitest';
import { citricInJuiceG, juiceMl } from './lemon-juice.js';

describe('juice', () => {
  it('Penniston 2008: 7 g of citric acid are 146 mL of fresh lemon juice', () => {
    expect(juiceMl(7, 'freshLemon')).toBeCloseTo(146, 0);
    expect(citricInJuiceG(juiceMl(7, 'bottledLime'), 'bottledLime')).toBeCloseTo(7, 9);
  });

  it('refuses a negative', () => {
    expect(() => juiceMl(-1, 'freshLemon')).toThrow(RangeError);
  });
});
