import { describe, expect, it } from 'vitest';
import { buildIngredient, buildLot, teaFacts } from '../../testing/stores-builders.ts';
import { firstBestBefore, marksOf, nextPricePerKg } from './stock-marks.ts';

const today = '2026-06-01';
const words = (ingredient: Parameters<typeof marksOf>[0]) => marksOf(ingredient, today).map(({ word }) => word);

describe(marksOf, () => {
  it('says nothing of what is plenty and fresh', () => {
    expect(words(buildIngredient(teaFacts, [buildLot({ bestBefore: '2026-06-01' })]))).toEqual([]);
  });

  it('tells low from none, and sees one lot below zero behind another', () => {
    expect(words(buildIngredient(teaFacts, [buildLot({ stockG: 10 })], { isLow: true }))).toEqual(['low']);
    expect(words(buildIngredient(teaFacts, [], { isLow: true }))).toEqual(['none left']);
    expect(words(buildIngredient(teaFacts, [buildLot({ stockG: -20 }), buildLot({ stockG: 50 })]))).toEqual([
      'below zero',
    ]);
  });

  it('calls a lot past its date only while something of it is left', () => {
    const old = { bestBefore: '2026-05-31' };
    expect(words(buildIngredient(teaFacts, [buildLot(old)]))).toEqual(['past its date']);
    expect(words(buildIngredient(teaFacts, [buildLot({ ...old, stockG: 0 }), buildLot()]))).toEqual([]);
  });
});

describe('the date and the price in the table', () => {
  it('are those of what is used next', () => {
    const lots = [
      buildLot({ stockG: 0, bestBefore: '2026-01-01', pricePerKg: 10 }),
      buildLot({ bestBefore: '2026-09-01', pricePerKg: 20 }),
    ];
    expect(firstBestBefore(lots)).toBe('2026-09-01');
    expect(nextPricePerKg(lots)).toBe(20);
    expect(nextPricePerKg([])).toBeNull();
  });
});
