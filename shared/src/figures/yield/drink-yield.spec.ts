import { describe, expect, it } from 'vitest';
import { concentrationFactor, drinkYieldL } from './drink-yield.js';

const losses = { startL: 20, leafG: 100, hopsG: 60, evaporatedL: 0.05, deadSpaceL: 0 };

describe('yield', () => {
  it('judgement and common practice: 20 - 0.40 - 0.42 - 0.05 is 19.1 L', () => {
    const answer = drinkYieldL(losses);
    expect(answer.value).toBeCloseTo(19.13, 9);
    expect(answer.leafL).toBeCloseTo(0.4, 9);
    expect(answer.hopsL).toBeCloseTo(0.42, 9);
    expect(answer.low).toBeLessThan(answer.value);
    expect(answer.high).toBeGreaterThan(answer.value);
  });

  it('common practice (from memory): cones hold about 10 L/kg', () => {
    const answer = drinkYieldL({ ...losses, hopsG: 0, conesG: 60 });
    expect(answer.hopsL).toBeCloseTo(0.6, 9);
    expect(answer.value).toBeCloseTo(18.95, 9);
    expect(answer.hopsLowL).toBeLessThan(answer.hopsL);
    expect(answer.hopsHighL).toBeGreaterThan(answer.hopsL);
  });

  it('is never below nothing, and evaporation makes it stronger', () => {
    expect(drinkYieldL({ ...losses, deadSpaceL: 30 }).value).toBe(0);
    expect(concentrationFactor(20, 1)).toBeCloseTo(20 / 19, 12);
  });

  it('refuses a negative loss, and more steam than water', () => {
    expect(() => drinkYieldL({ ...losses, leafG: -1 })).toThrow(RangeError);
    expect(() => concentrationFactor(1, 1)).toThrow(RangeError);
  });
});
