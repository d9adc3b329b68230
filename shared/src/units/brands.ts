/**
 * The closed set of quantity brands. A suffix on a name speaks to the reader; a brand speaks to the compiler.
 * Arithmetic drops a brand on purpose: re-enter by a constructor, once, at the return.
 */
declare const unit: unique symbol;
type Quantity<Name extends string> = number & { readonly [unit]: Name };

/** Absolute temperature on the Celsius scale. */
export type Celsius = Quantity<'Celsius'>;
/** A temperature difference in kelvin; never an absolute temperature. */
export type CelsiusDelta = Quantity<'CelsiusDelta'>;
export type Grams = Quantity<'Grams'>;
export type Liters = Quantity<'Liters'>;
export type Seconds = Quantity<'Seconds'>;
/** Milliseconds since 1970-01-01T00:00:00Z, on the clock the name says (run clock or wall clock). */
export type EpochMs = Quantity<'EpochMs'>;
/** A share from 0 to 1. */
export type Ratio = Quantity<'Ratio'>;
/** A share from 0 to 100. */
export type Percent = Quantity<'Percent'>;
/** Absolute or gauge pressure in kilopascal; the name says which. */
export type Kilopascal = Quantity<'Kilopascal'>;

/** Lowest temperature that exists, in degrees Celsius (SI Brochure: 0 K = -273.15 °C). */
const ABSOLUTE_ZERO_C = -273.15;

function finite(value: number, what: string): number {
  if (!Number.isFinite(value)) throw new RangeError(`${what} must be a finite number, got ${value}`);
  return value;
}

function notNegative(value: number, what: string): number {
  if (finite(value, what) < 0) throw new RangeError(`${what} must not be negative, got ${value}`);
  return value;
}

/** @throws RangeError below absolute zero or when not finite. */
export function celsius(value: number): Celsius {
  if (finite(value, 'A temperature in °C') < ABSOLUTE_ZERO_C) {
    throw new RangeError(`A temperature in °C must be at or above ${ABSOLUTE_ZERO_C}, got ${value}`);
  }
  return value as Celsius;
}

/** @throws RangeError when not finite. */
export function celsiusDelta(value: number): CelsiusDelta {
  return finite(value, 'A temperature difference in K') as CelsiusDelta;
}

/** @throws RangeError when negative or not finite. */
export function grams(value: number): Grams {
  return notNegative(value, 'A mass in g') as Grams;
}

/** @throws RangeError when negative or not finite. */
export function liters(value: number): Liters {
  return notNegative(value, 'A volume in L') as Liters;
}

/** @throws RangeError when not finite; negative spans are allowed ("12 s ago"). */
export function seconds(value: number): Seconds {
  return finite(value, 'A duration in s') as Seconds;
}

/** @throws RangeError when not finite. */
export function epochMs(value: number): EpochMs {
  return finite(value, 'An instant in epoch ms') as EpochMs;
}

/** @throws RangeError outside 0 to 1. */
export function ratio(value: number): Ratio {
  if (notNegative(value, 'A ratio') > 1) throw new RangeError(`A ratio must be from 0 to 1, got ${value}`);
  return value as Ratio;
}

/** @throws RangeError outside 0 to 100. */
export function percent(value: number): Percent {
  if (notNegative(value, 'A percentage') > 100)
    throw new RangeError(`A percentage must be from 0 to 100, got ${value}`);
  return value as Percent;
}

/** @throws RangeError when not finite; a gauge pressure may be negative. */
export function kilopascal(value: number): Kilopascal {
  return finite(value, 'A pressure in kPa') as Kilopascal;
}
