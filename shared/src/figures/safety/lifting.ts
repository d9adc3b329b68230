import { notNegative, positive, within } from '../numeric/guard.js';

/**
 * Mass of a filled vessel, kg.
 *
 * @param keg volume L and tare kg of 0 or more; density above 0 kg/L, 1 unless told.
 * @throws RangeError outside these ranges.
 * @example kegMassKg({ volumeL: 18.93, tareKg: 4.3 }) // 23.2
 */
export function kegMassKg(keg: { volumeL: number; tareKg: number; densityKgPerL?: number }): number {
  const density = positive(keg.densityKgPerL ?? 1, 'A density', 'kg/L');
  return notNegative(keg.volumeL, 'A volume', 'L') * density + notNegative(keg.tareKg, 'A tare', 'kg');
}

export interface Lift {
  /** Hands before the ankles, cm; counted as 25 when nearer. */
  reachCm: number;
  /** Hands above the floor at the start, cm. */
  heightCm: number;
  /** How far up or down it goes, cm; counted as 25 when less. */
  travelCm: number;
  /** Turn of the trunk, degrees. */
  twistDeg?: number;
  /** 0 to 1: less when it is done often. */
  frequencyFactor?: number;
  grip: 'good' | 'fair' | 'poor';
}

function gripFactor({ grip, heightCm }: Lift): number {
  if (grip === 'good') return 1;
  if (grip === 'poor') return 0.9;
  return heightCm < 75 ? 0.95 : 1;
}

/**
 * Mass that most healthy people may lift in this way, kg: never above 23.
 *
 * @param lift reach 0 to 63 cm, height 0 to 175 cm, travel 0 to 175 cm, twist 0 to 135 degrees.
 * @throws RangeError outside these ranges.
 * @see NIOSH revised lifting equation, 1991 (text of the equation from memory).
 * @example recommendedLiftKg({ reachCm: 25, heightCm: 75, travelCm: 25, grip: 'good' }) // 23
 */
export function recommendedLiftKg(lift: Lift): number {
  const reach = 25 / Math.max(25, within(lift.reachCm, 'A reach', 0, 63, 'cm'));
  const height = 1 - 0.003 * Math.abs(within(lift.heightCm, 'A lifting height', 0, 175, 'cm') - 75);
  const travel = Math.min(1, 0.82 + 4.5 / Math.max(25, within(lift.travelCm, 'A lifting travel', 0, 175, 'cm')));
  const twist = 1 - 0.0032 * within(lift.twistDeg ?? 0, 'A twist', 0, 135, 'degrees');
  return (
    23 *
    reach *
    height *
    travel *
    twist *
    within(lift.frequencyFactor ?? 1, 'A frequency factor', 0, 1) *
    gripFactor(lift)
  );
}

/** Load over the recommended mass; above 1 it is a two-person lift, or a trolley. @throws RangeError when out of range. */
export function liftingIndex(loadKg: number, lift: Lift): number {
  return notNegative(loadKg, 'A load', 'kg') / positive(recommendedLiftKg(lift), 'A recommended mass', 'kg');
}
