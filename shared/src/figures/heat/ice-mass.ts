import { notNegative, within } from '../numeric/guard.js';
import { specificHeatJPerKgK } from './specific-heat.js';

/** J/kg (from memory). */
const FUSION_J_PER_KG = 333_550;

/**
 * Ice at 0 °C that takes a warm mass down to a temperature when all of it melts in, g. It dilutes by that much water.
 *
 * @param massG water-like mass, 0 or more, g.
 * @param fromC 0 to 100 °C.
 * @param toC above 0 °C, not above `fromC`.
 * @throws RangeError outside these ranges.
 * @see energy balance; heat of fusion 333.55 kJ/kg, from memory.
 * @example iceMassG(10_000, 60, 10) // 5580
 */
export function iceMassG(massG: number, fromC: number, toC: number): number {
  const from = within(fromC, 'A start temperature', 0, 100, '°C');
  const to = within(toC, 'A target temperature', 0.1, from, '°C');
  const c = specificHeatJPerKgK.water;
  return (notNegative(massG, 'A mass', 'g') * c * (from - to)) / (FUSION_J_PER_KG + c * to);
}
