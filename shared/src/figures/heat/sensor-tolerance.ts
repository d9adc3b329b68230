import { entryOf, finite } from '../numeric/guard.js';

/** Limit at 0 °C in K, and how it grows per °C. */
const platinumClass = {
  AA: { atZeroK: 0.1, perC: 0.0017 },
  A: { atZeroK: 0.15, perC: 0.002 },
  B: { atZeroK: 0.3, perC: 0.005 },
  C: { atZeroK: 0.6, perC: 0.01 },
} as const;

export type PlatinumClass = keyof typeof platinumClass;

/**
 * What a platinum resistance thermometer may be off, K either way.
 *
 * @param tempC any temperature in its class's range, °C.
 * @throws RangeError on an unknown class or a temperature that is not finite.
 * @see IEC 60751.
 * @example platinumToleranceK('B', 82) // 0.71
 */
export function platinumToleranceK(sensorClass: PlatinumClass, tempC: number): number {
  const { atZeroK, perC } = entryOf(platinumClass, sensorClass, 'A platinum class');
  return atZeroK + perC * Math.abs(finite(tempC, 'A temperature', '°C'));
}

/**
 * What the common one-wire chip probe may be off, K either way; null outside its range of -55 to 125 °C.
 *
 * @throws RangeError when the temperature is not finite.
 * @see Maxim DS18B20 data sheet, DC characteristics.
 */
export function oneWireToleranceK(tempC: number): number | null {
  const t = finite(tempC, 'A temperature', '°C');
  if (t >= -10 && t <= 85) return 0.5;
  return t >= -55 && t <= 125 ? 2 : null;
}

/** K either way, up to a temperature, °C. Interchangeable thermistor: makers' sheets. Thermocouples: IEC 60584. */
const flatTolerance = {
  thermistor: { limitK: 0.2, fromC: 0, toC: 70 },
  typeTClass1: { limitK: 0.5, fromC: -40, toC: 125 },
  typeTClass2: { limitK: 1, fromC: -40, toC: 133 },
  typeKClass1: { limitK: 1.5, fromC: -40, toC: 375 },
  typeKClass2: { limitK: 2.5, fromC: -40, toC: 333 },
} as const;

export type FlatToleranceSensor = keyof typeof flatTolerance;

/**
 * What a thermistor or a thermocouple may be off, K either way; null where the limit no longer is one number.
 *
 * @throws RangeError on an unknown sensor or a temperature that is not finite.
 * @see IEC 60584 (lower ends from memory); makers of interchangeable thermistors.
 * @example flatToleranceK('typeTClass1', 82) // 0.5
 */
export function flatToleranceK(sensor: FlatToleranceSensor, tempC: number): number | null {
  const { limitK, fromC, toC } = entryOf<FlatToleranceSensor, { limitK: number; fromC: number; toC: number }>(
    flatTolerance,
    sensor,
    'A sensor',
  );
  const t = finite(tempC, 'A temperature', '°C');
  return t >= fromC && t <= toC ? limitK : null;
}
