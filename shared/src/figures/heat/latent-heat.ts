import { within } from '../numeric/guard.js';

/**
 * Heat that evaporating one kilogram of water takes, J/kg; within 0.5 %.
 *
 * @param tempC 0 to 100 °C.
 * @throws RangeError outside that range.
 * @see straight line through IAPWS-95 (computed).
 * @example latentHeatJPerKg(100) // 2 264 900
 */
export function latentHeatJPerKg(tempC: number): number {
  return 2_500_900 - 2360 * within(tempC, 'A water temperature', 0, 100, '°C');
}
