import { finite, notNegative, positive, within } from '../numeric/guard.js';

export type Sanitiser =
  | { kind: 'hot-water-immersion'; waterC: number }
  | { kind: 'chlorine'; mgPerL: number; ph: number; tempC: number }
  /** Iodine, quat, peracetic and others: the label rules. */
  | { kind: 'other'; labelS?: number };

/**
 * Least contact time, s; null when the water is too cool to sanitise. Clean first: a dirty surface does not count. The label
 * of the product comes before this.
 *
 * @throws RangeError outside sensible ranges.
 * @see FDA Food Code 4-703.11: immersion at 77 °C for 30 s; chlorine 10 s, 7 s at 50 mg/L warm enough; others 30 s.
 */
export function sanitiserContactS(sanitiser: Sanitiser): number | null {
  if (sanitiser.kind === 'hot-water-immersion')
    return finite(sanitiser.waterC, 'A water temperature', '°C') >= 77 ? 30 : null;
  if (sanitiser.kind === 'other') return Math.max(30, notNegative(sanitiser.labelS ?? 0, 'A label time', 's'));
  const ph = within(sanitiser.ph, 'A pH', 0, 14);
  const tempC = finite(sanitiser.tempC, 'A temperature', '°C');
  const fifty = Math.abs(positive(sanitiser.mgPerL, 'A chlorine strength', 'mg/L') - 50) < 0.5;
  return fifty && ((ph <= 10 && tempC >= 38) || (ph <= 8 && tempC >= 24)) ? 7 : 10;
}
