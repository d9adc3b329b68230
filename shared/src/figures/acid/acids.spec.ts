import { describe, expect, it } from 'vitest';
import { acidMassG, acidMolPerL, type AcidKind } from './acids.js';

describe('acids', () => {
  it('molar masses: 7 g of anhydrous citric acid in 20 L are 1.822 mmol/L', () => {
    expect(acidMolPerL({ acid: 'citricAnhydrous', massG: 7 }, 20) * 1000).toBeCloseTo(1.822, 3);
    expect(acidMassG('citricAnhydrous', 0.003003, 1)).toBeCloseTo(0.577, 3);
  });

  it('molar masses: the monohydrate is 9 % weaker, and 80 % lactic acid takes a quarter more', () => {
    const dry = acidMolPerL({ acid: 'citricAnhydrous', massG: 1 }, 1);
    expect(acidMolPerL({ acid: 'citricMonohydrate', massG: 1 }, 1) / dry).toBeCloseTo(0.914, 3);
    expect(acidMassG('lactic', 0.01, 1, 80)).toBeCloseTo(1.25 * acidMassG('lactic', 0.01, 1), 9);
  });

  it('refuses a negative mass and an unknown acid', () => {
    expect(() => acidMolPerL({ acid: 'lactic', massG: -1 }, 1)).toThrow(RangeError);
    expect(() => acidMolPerL({ acid: 'vinegar' as AcidKind, massG: 1 }, 1)).toThrow(/one of citricAnhydrous/);
  });
});
