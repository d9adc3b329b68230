import { weakest, type Band } from './band.js';

function spanning(values: readonly number[], value: number, ...inputs: readonly Band[]): Band {
  return {
    low: Math.min(value, ...values),
    value,
    high: Math.max(value, ...values),
    grade: weakest(...inputs.map(({ grade }) => grade)),
  };
}

/** Sum of bands as if all were low or high together: the widest it can be. */
export function addBands(...bands: readonly Band[]): Band {
  const sum = (pick: (one: Band) => number) => bands.reduce((total, one) => total + pick(one), 0);
  return spanning(
    [sum(({ low }) => low), sum(({ high }) => high)],
    sum(({ value }) => value),
    ...bands,
  );
}

/** Difference of two bands, the widest it can be. */
export function subtractBands(one: Band, other: Band): Band {
  return spanning([one.low - other.high, one.high - other.low], one.value - other.value, one, other);
}

/** Product of two bands, the widest it can be. */
export function multiplyBands(one: Band, other: Band): Band {
  const corners = [one.low * other.low, one.low * other.high, one.high * other.low, one.high * other.high];
  return spanning(corners, one.value * other.value, one, other);
}

/**
 * Quotient of two bands, the widest it can be.
 *
 * @throws RangeError when the divisor may be 0.
 */
export function divideBands(one: Band, other: Band): Band {
  if (other.low <= 0 && other.high >= 0) {
    throw new RangeError(`A divisor must not span 0, got ${other.low} to ${other.high}. Divide by a band on one side.`);
  }
  const corners = [one.low / other.low, one.low / other.high, one.high / other.low, one.high / other.high];
  return spanning(corners, one.value / other.value, one, other);
}

/** A band through a function that only rises or only falls. */
export function mapBand(one: Band, monotone: (x: number) => number): Band {
  return spanning([monotone(one.low), monotone(one.high)], monotone(one.value), one);
}
