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

/** @throws RangeError when not finite or not above 0. */
export function positive(value: number, what: string, unit = ''): number {
  if (!(value > 0 && value < Infinity)) {
    throw new RangeError(
      `${what} must be above 0${unit === '' ? '' : ` ${unit}`}, got ${value}. Give a positive value.`,
    );
  }
  return value;
}

/** @throws RangeError when not finite or below 0. */
export function notNegative(value: number, what: string, unit = ''): number {
  if (!(value >= 0 && value < Infinity)) {
    throw new RangeError(`${what} must be 0${unit === '' ? '' : ` ${unit}`} or more, got ${value}. Give 0 or more.`);
  }
  return value;
}

/** @throws RangeError when not finite. */
export function finite(value: number, what: string, unit = ''): number {
  if (!Number.isFinite(value)) {
    throw new RangeError(`${what} must be a number${unit === '' ? '' : ` in ${unit}`}, got ${value}. Give a number.`);
  }
  return value;
}

/** Looks a key up in a table of the figures. @throws RangeError naming the keys that exist. */
export function entryOf<Key extends string, Value>(table: Readonly<Record<Key, Value>>, key: Key, what: string): Value {
  if (!Object.hasOwn(table, key)) {
    throw new RangeError(`${what} must be one of ${Object.keys(table).join(', ')}, got ${key}. Choose one of these.`);
  }
  return table[key];
}
