import { entryOf, notNegative } from '../numeric/guard.js';
import { specificHeatJPerKgK, type HeatedMaterial } from './specific-heat.js';

export interface HeatedPart {
  massG: number;
  material: HeatedMaterial;
}

/**
 * Heat that it takes to warm everything in the kettle, and the kettle, by one kelvin, J/K.
 *
 * @param parts masses of 0 g or more.
 * @throws RangeError on a negative mass or an unknown material.
 * @see sum of mass times specific heat; sources in specific-heat.ts.
 * @example heatCapacityJPerK([{ massG: 10_000, material: 'water' }]) // 41 860
 */
export function heatCapacityJPerK(parts: readonly HeatedPart[]): number {
  return parts.reduce((sum, { massG, material }) => {
    const perKg = entryOf(specificHeatJPerKgK, material, 'A material');
    return sum + (notNegative(massG, 'A mass', 'g') / 1000) * perKg;
  }, 0);
}
