import { finite, notNegative, within } from '../numeric/guard.js';

/**
 * How well a number is known. `solid`: equilibrium, molar mass or standard, below 2 % or 0.03 pH. `measured`: in a system next
 * to this one, 30 % to a factor of two. `judged`: from cited facts, a factor of two to three; let people edit it.
 */
export type Grade = 'solid' | 'measured' | 'judged';

/** A value with the range it is believed in (about nine times out of ten) and how that is known. */
export interface Band {
  readonly low: number;
  readonly value: number;
  readonly high: number;
  readonly grade: Grade;
}

const order: readonly Grade[] = ['solid', 'measured', 'judged'];

/** The weaker of some grades: a chain is as good as its weakest link. */
export function weakest(...grades: readonly Grade[]): Grade {
  return order[Math.max(0, ...grades.map((grade) => order.indexOf(grade)))] ?? 'judged';
}

/** @throws RangeError when not finite, or not low, value, high in this order. */
export function band(low: number, value: number, high: number, grade: Grade): Band {
  finite(low, 'The low end of a band');
  finite(high, 'The high end of a band');
  if (!(low <= finite(value, 'The value of a band') && value <= high)) {
    throw new RangeError(`A band must go up, got ${low}, ${value}, ${high}. Order its ends.`);
  }
  return { low, value, high, grade };
}

/** A number known without doubt. @throws RangeError when not finite. */
export function sure(value: number): Band {
  return band(value, value, value, 'solid');
}

/** Beyond it a factor says nothing. */
const MOST_FACTOR = 1e6;

/** A value that may be off by a factor either way. @param factor 1 to a million. @throws RangeError otherwise. */
export function withinFactor(value: number, factor: number, grade: Grade): Band {
  const f = within(factor, 'A factor', 1, MOST_FACTOR);
  return value < 0 ? band(value * f, value, value / f, grade) : band(value / f, value, value * f, grade);
}

/** A value that may be off by so much either way. @param spread 0 or more. @throws RangeError otherwise. */
export function plusMinus(value: number, spread: number, grade: Grade): Band {
  return band(value - notNegative(spread, 'A spread'), value, value + spread, grade);
}
