import { describe, expect, it } from 'vitest';
import { co2Volumes } from '../gas/co2-volumes.js';
import { abvFromFermentedSugar, co2FromFermentedSugarGPerL, sugarForAbvGPerL } from './fermented-sugar.js';

describe('fermented sugar (stoichiometry, constants from memory)', () => {
  it.each([
    [1, 0.06477],
    [10, 0.6477],
  ])('%s g/L gives %s % by volume', (sugar, abv) => {
    expect(Math.abs(abvFromFermentedSugar(sugar) / abv - 1)).toBeLessThan(0.01);
  });

  it.each([
    [0.05, 0.77],
    [0.5, 7.7],
    [1.2, 18.5],
  ])('%s % takes %s g/L', (abv, sugar) => {
    expect(Math.abs(sugarForAbvGPerL(abv) / sugar - 1)).toBeLessThan(0.01);
  });

  it('makes about a quarter volume of gas per g/L, and refuses a negative', () => {
    expect(co2Volumes(co2FromFermentedSugarGPerL(1))).toBeCloseTo(0.25, 2);
    expect(() => abvFromFermentedSugar(-1)).toThrow(RangeError);
  });
});
