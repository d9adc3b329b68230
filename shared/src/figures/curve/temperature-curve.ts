import { finite } from '../numeric/guard.js';

/** One point of a planned or a recorded curve. `atMs` is the run clock, or ms from any start: only differences count. */
export interface CurvePoint {
  readonly atMs: number;
  readonly tempC: number;
}

/** Points in order of time; between two points the temperature is a straight line. */
export type TemperatureCurve = readonly CurvePoint[];

/** A clock that was set in between, or two clocks in one curve: no drink takes so long, and sums over it would never end. */
const LONGEST_MS = 366 * 86_400_000;

/** @throws RangeError when a point is not finite, an earlier one comes after a later one, or it takes more than a year. */
export function checkedCurve(curve: TemperatureCurve): TemperatureCurve {
  let last = -Infinity;
  for (const { atMs, tempC } of curve) {
    finite(tempC, 'A temperature of the curve', '°C');
    if (finite(atMs, 'A time of the curve', 'ms') < last) {
      throw new RangeError(`A curve must be in order of time, got ${atMs} after ${last}. Sort its points.`);
    }
    last = atMs;
  }
  const spanMs = last - (curve[0]?.atMs ?? last);
  if (spanMs > LONGEST_MS) {
    throw new RangeError(`A curve must be of a year at most, got ${spanMs} ms. Give all its times by one clock.`);
  }
  return curve;
}

/**
 * Temperature at an instant, °C, on a straight line between the two nearest points; null before the first and after the
 * last. Where two points share an instant, the later one counts.
 *
 * @throws RangeError when `atMs` is not finite.
 */
export function curveTempC(curve: TemperatureCurve, atMs: number): number | null {
  finite(atMs, 'An instant', 'ms');
  let low = 0;
  let high = curve.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((curve[middle]?.atMs ?? Infinity) <= atMs) low = middle + 1;
    else high = middle;
  }
  const before = curve[low - 1];
  const after = curve[low];
  if (!before) return null;
  if (before.atMs === atMs) return before.tempC;
  if (!after) return null;
  return before.tempC + ((after.tempC - before.tempC) * (atMs - before.atMs)) / (after.atMs - before.atMs);
}

/**
 * The part of a curve between two instants, with its ends put in; empty when the curve does not meet them.
 *
 * @throws RangeError when an instant is not finite.
 */
export function curveBetween(curve: TemperatureCurve, fromMs: number, toMs: number): TemperatureCurve {
  finite(toMs, 'An instant', 'ms');
  const points = curve.filter(({ atMs }) => atMs > fromMs && atMs < toMs);
  const first = curveTempC(curve, fromMs);
  const last = toMs > fromMs ? curveTempC(curve, toMs) : null;
  return [
    ...(first === null ? [] : [{ atMs: fromMs, tempC: first }]),
    ...points,
    ...(last === null ? [] : [{ atMs: toMs, tempC: last }]),
  ];
}

/**
 * A curve from recorded readings: those without a temperature are left out, the rest put in order of time. Judge them first
 * (the watch does): a driver code such as -127 is a number like any other here.
 */
export function curveFromReadings(
  readings: readonly { readonly atMs: number; readonly tempC: number | null }[],
): TemperatureCurve {
  const points = readings.flatMap(({ atMs, tempC }) => (tempC === null ? [] : [{ atMs, tempC }]));
  return checkedCurve(points.sort((a, b) => a.atMs - b.atMs));
}
