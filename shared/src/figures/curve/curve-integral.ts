import { checkedCurve, type TemperatureCurve } from './temperature-curve.js';

/** A rate that doubles every few kelvin is summed to better than one part in a million in pieces of this height. */
const PIECE_K = 2;
/** Below this the middle of a piece says nothing that its ends do not: a recorded curve is mostly such pieces. */
const FLAT_K = 0.1;

/**
 * A rate that depends on temperature, summed over a planned or recorded curve. The unit is that of the rate times minutes.
 *
 * @param ratePerMin smooth in the temperature.
 * @throws RangeError on a curve that is out of order or not finite.
 * @see Simpson's rule on the straight lines between points, the trapezium where they are nearly flat.
 * @example curveIntegralMin([{ atMs: 0, tempC: 80 }, { atMs: 240_000, tempC: 80 }], () => 1) // 4
 */
export function curveIntegralMin(curve: TemperatureCurve, ratePerMin: (tempC: number) => number): number {
  checkedCurve(curve);
  const first = curve[0];
  if (!first) return 0;
  let sum = 0;
  let before = first;
  let rateBefore = ratePerMin(first.tempC);
  for (let index = 1; index < curve.length; index += 1) {
    const point = curve[index];
    if (!point) break;
    const durationMin = (point.atMs - before.atMs) / 60_000;
    const climb = point.tempC - before.tempC;
    if (durationMin > 0 && climb === 0) {
      sum += rateBefore * durationMin;
    } else if (Math.abs(climb) < FLAT_K) {
      const rateAfter = ratePerMin(point.tempC);
      sum += ((rateBefore + rateAfter) / 2) * durationMin;
      rateBefore = rateAfter;
    } else {
      const pieces = durationMin > 0 ? Math.ceil(Math.abs(climb) / PIECE_K) : 1;
      for (let piece = 1; piece <= pieces; piece += 1) {
        const middle = ratePerMin(before.tempC + (climb * (piece - 0.5)) / pieces);
        const rateAfter = ratePerMin(before.tempC + (climb * piece) / pieces);
        sum += ((rateBefore + 4 * middle + rateAfter) / 6) * (durationMin / pieces);
        rateBefore = rateAfter;
      }
    }
    before = point;
  }
  return sum;
}
