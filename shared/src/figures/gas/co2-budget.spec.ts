import { describe, expect, it } from 'vitest';
import { co2Budget, co2GasG, purgedAirRatio } from './co2-budget.js';
import { co2GPerLFromVolumes } from './co2-volumes.js';

const keg = { gPerL: co2GPerLFromVolumes(2.7), drinkL: 18, headspaceL: 1, tempC: 3, absoluteKPa: 181 };

describe('CO2 budget of a keg', () => {
  it('gas law with Weiss 1974, computed: 96.1 g dissolved, 3.5 g above it, 62.9 g to push 18 L out', () => {
    const budget = co2Budget(keg);
    expect(budget.dissolvedG).toBeCloseTo(96.1, 1);
    expect(budget.headspaceG).toBeCloseTo(3.5, 1);
    expect(budget.pushG).toBeCloseTo(62.9, 1);
    expect(budget.totalG).toBeCloseTo(budget.dissolvedG + budget.headspaceG + budget.pushG, 9);
  });

  it('finds none in vapour alone', () => {
    expect(co2GasG({ volumeL: 1, tempC: 20, absoluteKPa: 1 })).toBe(0);
  });

  it('dilutes the air by the ratio of pressures each time', () => {
    expect(purgedAirRatio(301.325, 101.325, 0)).toBe(1);
    expect(purgedAirRatio(301.325, 101.325, 3)).toBeCloseTo(0.038, 3);
  });

  it('refuses half a cycle, a vacuum and a negative volume', () => {
    expect(() => purgedAirRatio(301, 101, 1.5)).toThrow(RangeError);
    expect(() => purgedAirRatio(50, 101, 1)).toThrow(RangeError);
    expect(() => co2Budget({ ...keg, drinkL: -1 })).toThrow(RangeError);
  });
});
