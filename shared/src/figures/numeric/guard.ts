/**
 * Returns the value when it lies in its valid range; otherwise says what was wrong and what to give instead.
 *
 * @throws RangeError when not finite or outside `min` to `max`.
 */
export function within(value: number, what: string, min: number, max: number, unit = ''): number {
  if (!(value >= min && value <= max)) {
    const suffix = unit === '' ? '' : ` ${unit}`;
    throw new RangeError(`${what} must be from ${min} to ${max}${suffix}, got ${value}. Give a value in that range.`);
  }
  return value;
}

/**
 * Far more than a number of that unit can mean where drinks are made: a finger slipped, or the unit is another one. Instants
 * are as large as a clock.
 */
const MOST: Readonly<Record<string, number>> = { ms: 8.64e15, s: 1e8, 'J/K': 1e8, Pa: 1e8 };
const MOST_ELSE = 1e6;
const ABSOLUTE_ZERO_C = -273.15;
const HOTTEST_C = 1000;

function notAbsurd(value: number, what: string, unit: string): number {
  const most = MOST[unit] ?? MOST_ELSE;
  if (Math.abs(value) > most) {
    throw new RangeError(
      `${what} must be ${most}${unit === '' ? '' : ` ${unit}`} at most, got ${value}. Check the number and its unit.`,
    );
  }
  return value;
}

/** @throws RangeError when not finite, not above 0, or absurdly large. */
export function positive(value: number, what: string, unit = ''): number {
  if (!(value > 0 && value < Infinity)) {
    throw new RangeError(
      `${what} must be above 0${unit === '' ? '' : ` ${unit}`}, got ${value}. Give a positive value.`,
    );
  }
  return notAbsurd(value, what, unit);
}

/** @throws RangeError when not finite, below 0, or absurdly large. */
export function notNegative(value: number, what: string, unit = ''): number {
  if (!(value >= 0 && value < Infinity)) {
    throw new RangeError(`${what} must be 0${unit === '' ? '' : ` ${unit}`} or more, got ${value}. Give 0 or more.`);
  }
  return notAbsurd(value, what, unit);
}

/**
 * Any number of a unit that makes sense; without a unit, any number.
 *
 * @throws RangeError when not finite, or absurdly large for its unit.
 */
export function finite(value: number, what: string, unit = ''): number {
  if (!Number.isFinite(value)) {
    throw new RangeError(`${what} must be a number${unit === '' ? '' : ` in ${unit}`}, got ${value}. Give a number.`);
  }
  if (unit === '') return value;
  return unit === '°C' ? within(value, what, ABSOLUTE_ZERO_C, HOTTEST_C, unit) : notAbsurd(value, what, unit);
}

/** Looks a key up in a table of the figures. @throws RangeError naming the keys that exist. */
export function entryOf<Key extends string, Value>(table: Readonly<Record<Key, Value>>, key: Key, what: string): Value {
  if (!Object.hasOwn(table, key)) {
    throw new RangeError(`${what} must be one of ${Object.keys(table).join(', ')}, got ${key}. Choose one of these.`);
  }
  return table[key];
}
