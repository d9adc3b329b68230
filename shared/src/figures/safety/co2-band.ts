import { notNegative } from '../numeric/guard.js';

export type Co2Band = 'normal' | 'ventilate' | 'leave' | 'evacuate';

/**
 * What a CO2 level in a room asks for.
 *
 * @param ppm 0 or more.
 * @throws RangeError when negative or not finite.
 * @see OSHA 8-hour limit 5000 ppm; NIOSH 15-minute limit 30 000 ppm; NIOSH immediately dangerous level 40 000 ppm.
 * @example co2Band(5000) // 'ventilate'
 */
export function co2Band(ppm: number): Co2Band {
  const level = notNegative(ppm, 'A CO2 level', 'ppm');
  if (level >= 40_000) return 'evacuate';
  if (level >= 30_000) return 'leave';
  return level >= 5000 ? 'ventilate' : 'normal';
}
