import { describe, expect, it } from 'vitest';
import { caffeineMgPerL, childCaffeineMgPerDay, euCaffeineStatementNeeded, servingsToLimit } from './caffeine-label.js';

describe('caffeine on the label', () => {
  it.each([
    [180, true, true, false],
    [180, true, false, true],
    [180, false, true, true],
    [150, false, false, false],
  ])(
    'Regulation (EU) 1169/2011: %s mg/L, based on tea %s, named tea %s: words needed %s',
    (mg, based, named, needed) => {
      const drink = { caffeineMgPerL: mg, teaOrCoffeeBased: based, nameSaysTeaOrCoffee: named };
      expect(euCaffeineStatementNeeded(drink)).toBe(needed);
    },
  );

  it('Chin 2008: 61 mg in 6 fl oz is 343.8 mg/L', () => {
    expect(Math.abs(caffeineMgPerL(61, 6) / 343.8 - 1)).toBeLessThan(0.005);
  });

  it('EFSA 2015: 6.06 servings of 330 mL at 200 mg/L make 400 mg', () => {
    expect(Math.abs((servingsToLimit(200, 330, 400) ?? 0) - 6.06)).toBeLessThan(0.05);
    expect(servingsToLimit(0, 330, 400)).toBeNull();
    expect(childCaffeineMgPerDay(20)).toBe(60);
  });

  it('refuses a negative serving', () => {
    expect(() => servingsToLimit(200, -1, 400)).toThrow(RangeError);
    expect(() => caffeineMgPerL(Number.NaN, 6)).toThrow(RangeError);
  });
});
