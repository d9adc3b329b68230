import { checkedCurve, type TemperatureCurve } from '../curve/temperature-curve.js';
import { entryOf, notNegative } from '../numeric/guard.js';
import { extractionTurns } from './extraction.js';

const ENERGY_KJ = 35;

/**
 * How long the leaf has steeped, in minutes-equivalent at 80 °C. Give it the whole time from leaf in to leaf out, the chill
 * too if the leaf stays in.
 *
 * @throws RangeError on a curve that is out of order or not finite.
 * @see polyphenol extraction with 35 kJ/mol, relative to 80 °C.
 * @example 4 min at 82 °C are 4.28, 7 min at 98 °C are 12.5
 */
export function steepDoseMin(curve: TemperatureCurve): number {
  return extractionTurns(curve, 1, ENERGY_KJ);
}

/**
 * Good window and lines, minutes-equivalent at 80 °C. Windows of green, white and black after Saklar et al. 2015,
 * Perez-Burillo et al. 2018 and Fernando and Soysa 2015; oolong and all amber and red lines are judgement, within 40 %.
 */
export const steepWindows = {
  green: { from: 2.5, to: 8, amber: 8, red: 20 },
  white: { from: 4, to: 13, amber: 15, red: 30 },
  oolong: { from: 3, to: 10, amber: 10, red: 25 },
  black: { from: 3, to: 8, amber: 10, red: 25 },
  herbal: null,
} as const;

export type TeaKind = keyof typeof steepWindows;
export type SteepVerdict = 'short' | 'good' | 'long' | 'amber' | 'red';

/** The windows come from steeps of 60 °C and up. */
const LINES_FROM_C = 60;

/**
 * Whether the windows and lines mean anything for a steep: not for a cold one. A night at 5 °C counts as far past red, and is not:
 * what makes tea harsh hardly leaves cold leaf. Go by taste there.
 *
 * @param curve from leaf in to leaf out.
 * @throws RangeError on a curve that is out of order or not finite.
 * @see the coolest steeps behind the windows, Perez-Burillo et al. 2018.
 */
export function steepLinesHold(curve: TemperatureCurve): boolean {
  return checkedCurve(curve).some(({ tempC }) => tempC >= LINES_FROM_C);
}

/**
 * Where a steep stands. `long` is past the good window and before the amber line. Past amber little is gained but
 * astringency; nothing in this drink covers it. Herbs and rooibos are always `good`.
 *
 * @param doseMin 0 or more.
 * @throws RangeError when negative, or the tea is unknown.
 */
export function steepVerdict(tea: TeaKind, doseMin: number): SteepVerdict {
  const dose = notNegative(doseMin, 'A steep dose', 'min');
  const window = entryOf<TeaKind, (typeof steepWindows)[TeaKind]>(steepWindows, tea, 'A tea');
  if (window === null) return 'good';
  if (dose > window.red) return 'red';
  if (dose > window.amber) return 'amber';
  if (dose > window.to) return 'long';
  return dose < window.from ? 'short' : 'good';
}
