import { MINUS } from './number-text.js';

/**
 * A number rounded to so many significant figures; 0 stays 0.
 * `toSignificant(139, 2)` is 140, `toSignificant(0.00394, 2)` is 0.0039.
 *
 * @param digits whole number, 1 to 15.
 * @throws RangeError when the value is not finite or `digits` is out of range.
 */
export function toSignificant(value: number, digits = 2): number {
  if (!Number.isFinite(value)) throw new RangeError(`A value to round must be a finite number, got ${value}`);
  if (!Number.isInteger(digits) || digits < 1 || digits > 15) {
    throw new RangeError(`Significant figures must be a whole number from 1 to 15, got ${digits}`);
  }
  return Number(value.toPrecision(digits));
}

/**
 * The same as text, never in exponent form, with the zeros that the figures stand for: "140", "6.0", "0.0039".
 *
 * @throws RangeError as `toSignificant`.
 */
export function formatSignificant(value: number, digits = 2): string {
  const rounded = toSignificant(value, digits);
  if (rounded === 0) return '0';
  const exponent = Math.floor(Math.log10(Math.abs(rounded)) + 1e-12);
  const decimals = Math.min(100, Math.max(0, digits - 1 - exponent));
  return `${rounded < 0 ? MINUS : ''}${Math.abs(rounded).toFixed(decimals)}`;
}
