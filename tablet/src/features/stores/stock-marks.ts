import type { Ingredient, Lot } from '@steepfall/shared/contracts';
import type { Shape, Tone } from '#components/shapes.tsx';

export interface StockMark {
  word: string;
  shape: Shape;
  tone: Tone;
}

const belowZero: StockMark = { word: 'below zero', shape: 'diamond', tone: 'ember' };
const pastDate: StockMark = { word: 'past its date', shape: 'diamond', tone: 'ember' };
const low: StockMark = { word: 'low', shape: 'dash', tone: 'text' };
const none: StockMark = { word: 'none left', shape: 'ring', tone: 'soft' };

function isPast({ bestBefore, stockG }: Pick<Lot, 'bestBefore' | 'stockG'>, today: string): boolean {
  return bestBefore !== null && bestBefore < today && stockG > 0;
}

/** What a person should know of the stock at a glance, the worst first. */
export function marksOf({ stockG, isLow, lots }: Ingredient, today: string): StockMark[] {
  return [
    ...(lots.some((lot) => lot.stockG < 0) ? [belowZero] : []),
    ...(lots.some((lot) => isPast(lot, today)) ? [pastDate] : []),
    ...(stockG === 0 ? [none] : isLow ? [low] : []),
  ];
}

export function lotMarksOf(lot: Lot, today: string): StockMark[] {
  if (lot.stockG < 0) return [belowZero];
  if (lot.stockG === 0) return [none];
  return isPast(lot, today) ? [pastDate] : [];
}

/** The date that comes first among the lots that still hold something. */
export function firstBestBefore(lots: readonly Lot[]): string | null {
  const dates = lots.flatMap(({ bestBefore, stockG }) => (bestBefore !== null && stockG > 0 ? [bestBefore] : []));
  return dates.toSorted()[0] ?? null;
}

/** What the next gram costs: the price of the lot that is used first. */
export function nextPricePerKg(lots: readonly Lot[]): number | null {
  return (lots.find(({ stockG }) => stockG > 0) ?? lots[0])?.pricePerKg ?? null;
}
