import type { CurvePoint, TemperatureCurve } from '../figures/index.js';
import { gaps, type Gap, type Reading } from '../readings/index.js';

/** What a probe's driver says when it cannot read. */
const DRIVER_CODES: readonly number[] = [-127, 85];
/** A driver code is one only where the reading before was this far from it, K. */
const CODE_JUMP_K = 5;
/** No water in a kettle is outside, °C. */
const LEAST_C = -20;
const MOST_C = 115;
/** Further than this from both neighbours, which agree with each other, is a spike, K. */
const SPIKE_K = 2;
/** The line is fitted over so long either way: two lags of a usual probe. */
const HALF_WINDOW_MS = 15_000;
/** A straight line through fewer readings follows their noise. */
const LEAST_TO_FIT = 4;
/** The watch needs so long to find its line. */
const WATCH_SETTLES_MS = 60_000;
/** Silence for longer is a gap: what the liquid did in it is a straight line, s. */
const GAP_S = 60;
/** How far a thinned line may be from the whole one, K: 0.2 % of a steep dose, 0.5 % of what makes iso-alpha acids. */
export const LINE_WITHIN_K = 0.05;

/** The liquid as it was recorded, run clock. */
export interface RecordedLine {
  points: readonly CurvePoint[];
  /** Silences of more than a minute. */
  gaps: readonly Gap[];
}

export const NO_LINE: RecordedLine = { points: [], gaps: [] };

/**
 * The line of the liquid from the readings of its probe: what is no temperature of water left out, the lag taken out
 * (`T = probe + lag × slope`, on a straight line fitted over a quarter of a minute either way), and thinned. Where the watch's own line
 * is known it goes before.
 *
 * @param readings in order of time.
 * @param lagS time constant of the probe, 0 or more, s.
 * @param watched what the watch found (`WatchState.trail`), in order of time.
 * @returns points that lie within `LINE_WITHIN_K` of the line before it was thinned; run clock.
 */
export function liquidLine(readings: readonly Reading[], lagS: number, watched: TemperatureCurve = []): RecordedLine {
  const own = watched.filter(({ atMs }) => atMs >= (watched[0]?.atMs ?? 0) + WATCH_SETTLES_MS);
  const fromMs = own[0]?.atMs ?? Infinity;
  const toMs = own.at(-1)?.atMs ?? -Infinity;
  const told = sensible(readings);
  const found = withoutLag(told, lagS);
  const whole = [
    ...found.filter(({ atMs }) => atMs < fromMs),
    ...own,
    ...found.filter(({ atMs }) => atMs >= fromMs && atMs > toMs),
  ];
  return { points: thinnedLine(whole), gaps: gaps(told, GAP_S) };
}

function sensible(readings: readonly Reading[]): CurvePoint[] {
  const inRange = readings.flatMap(({ atMs, tempC }, index) => {
    if (tempC === null || !(tempC >= LEAST_C && tempC <= MOST_C)) return [];
    const before = readings[index - 1]?.tempC ?? tempC;
    return DRIVER_CODES.includes(tempC) && Math.abs(before - tempC) > CODE_JUMP_K ? [] : [{ atMs, tempC }];
  });
  return inRange.filter(({ tempC }, index) => {
    const before = inRange[index - 1]?.tempC;
    const after = inRange[index + 1]?.tempC;
    if (before === undefined || after === undefined) return true;
    return Math.min(Math.abs(tempC - before), Math.abs(tempC - after)) <= SPIKE_K + Math.abs(before - after);
  });
}

/** A fit over a moving window, from running sums: the same work for each point, however many lie in it. */
function withoutLag(points: readonly CurvePoint[], lagS: number): CurvePoint[] {
  const originMs = points[0]?.atMs ?? 0;
  let [from, to] = [0, 0];
  const sums = { n: 0, x: 0, y: 0, xx: 0, xy: 0 };
  const count = ({ atMs, tempC }: CurvePoint, sign: 1 | -1) => {
    const x = (atMs - originMs) / 1000;
    sums.n += sign;
    sums.x += sign * x;
    sums.y += sign * tempC;
    sums.xx += sign * x * x;
    sums.xy += sign * x * tempC;
  };
  return points.map((point) => {
    for (let next = points[to]; next && next.atMs <= point.atMs + HALF_WINDOW_MS; next = points[to]) {
      count(next, 1);
      to += 1;
    }
    for (let first = points[from]; first && first.atMs < point.atMs - HALF_WINDOW_MS; first = points[from]) {
      count(first, -1);
      from += 1;
    }
    const { n, x, y, xx, xy } = sums;
    const spread = n * xx - x * x;
    if (n < LEAST_TO_FIT || spread <= 0) return point;
    const slope = (n * xy - x * y) / spread;
    const seconds = (point.atMs - originMs) / 1000;
    return { atMs: point.atMs, tempC: y / n + slope * (seconds - x / n + lagS) };
  });
}

/**
 * The same line with fewer points: as long as one straight line passes all points in between by `withinK` or less, they are left out.
 * Both ends stay.
 *
 * @param points in order of time.
 */
export function thinnedLine(points: readonly CurvePoint[], withinK = LINE_WITHIN_K): readonly CurvePoint[] {
  const [first] = points;
  if (!first) return [];
  const kept = [first];
  let from = first;
  let before = first;
  let [least, most] = [-Infinity, Infinity];
  for (const point of points.slice(1)) {
    const spanMs = point.atMs - from.atMs;
    if (spanMs <= 0) continue;
    const slope = (point.tempC - from.tempC) / spanMs;
    if (before !== from && (slope < least || slope > most)) {
      kept.push(before);
      from = before;
      [least, most] = [-Infinity, Infinity];
    }
    const sinceMs = point.atMs - from.atMs;
    least = Math.max(least, (point.tempC - from.tempC - withinK) / sinceMs);
    most = Math.min(most, (point.tempC - from.tempC + withinK) / sinceMs);
    before = point;
  }
  if (before !== from) kept.push(before);
  return kept;
}
