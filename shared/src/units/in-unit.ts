import { gramsToOunces, ouncesToGrams } from './mass.js';
import type { UnitPreferences } from './preferences.js';
import { barToKpa, kpaToBar, kpaToPsi, psiToKpa } from './pressure.js';
import { celsiusToFahrenheit, fahrenheitToCelsius } from './temperature.js';
import { litersToUsGallons, usGallonsToLiters } from './volume.js';

interface Scale {
  toUnit: (inside: number) => number;
  toInside: (shown: number) => number;
}

const same: Scale = { toUnit: (x) => x, toInside: (x) => x };

const scales: { [Kind in keyof UnitPreferences]: Readonly<Record<UnitPreferences[Kind], Scale>> } = {
  temperature: { C: same, F: { toUnit: celsiusToFahrenheit, toInside: fahrenheitToCelsius } },
  mass: { g: same, oz: { toUnit: gramsToOunces, toInside: ouncesToGrams } },
  volume: { L: same, gal: { toUnit: litersToUsGallons, toInside: usGallonsToLiters } },
  pressure: {
    kPa: same,
    bar: { toUnit: kpaToBar, toInside: barToKpa },
    psi: { toUnit: kpaToPsi, toInside: psiToKpa },
  },
};

/**
 * A number from inside (°C, g, L, kPa) as a person wants to type or read it, without rounding: for fields and axes.
 *
 * @example inUnit('pressure', 72.7, 'psi') // 10.54
 */
export function inUnit<Kind extends keyof UnitPreferences>(
  kind: Kind,
  inside: number,
  unit: UnitPreferences[Kind],
): number {
  return scales[kind][unit].toUnit(inside);
}

/**
 * A number as a person typed it, taken inside (°C, g, L, kPa), without rounding.
 *
 * @example fromUnit('temperature', 170, 'F') // 76.67
 */
export function fromUnit<Kind extends keyof UnitPreferences>(
  kind: Kind,
  shown: number,
  unit: UnitPreferences[Kind],
): number {
  return scales[kind][unit].toInside(shown);
}
