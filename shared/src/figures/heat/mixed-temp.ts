import { finite, notNegative } from '../numeric/guard.js';

export interface MixedPart {
  massG: number;
  specificHeatJPerKgK: number;
  tempC: number;
}

/**
 * Temperature after things of different temperature have come to rest together, °C, nothing lost to the room. Count the
 * water that is left inside a coil: it matters more than the metal.
 *
 * @param parts masses and specific heats of 0 or more; at least one with both above 0.
 * @throws RangeError on negative or missing masses.
 * @see energy balance: heat-weighted mean.
 */
export function mixedTempC(parts: readonly MixedPart[]): number {
  let heat = 0;
  let capacity = 0;
  for (const part of parts) {
    const own =
      notNegative(part.massG, 'A mass', 'g') * notNegative(part.specificHeatJPerKgK, 'A specific heat', 'J/(kg K)');
    capacity += own;
    heat += own * finite(part.tempC, 'A temperature', '°C');
  }
  if (capacity === 0) throw new RangeError('Mixing must have at least one mass above 0 g, got none. Give a mass.');
  return heat / capacity;
}
