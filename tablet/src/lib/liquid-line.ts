import type { Reading } from '@steepfall/shared/readings';

/** What the liquid is doing over a stretch of a drawn line. */
export type Doing = 'climbing' | 'holding' | 'falling';

export interface LinePoint {
  atMs: number;
  tempC: number;
}

export interface Stretch {
  doing: Doing;
  fromMs: number;
  toMs: number;
}

/** What a probe's driver says when it cannot read: kept in the records, left out of drawings. */
const DRIVER_CODES: readonly number[] = [-127, 85];
/** For colouring a finished drawing only. Nothing is decided by it: alerts come from the watch. */
const HOLDING_C_PER_MIN = 0.35;
/** Slope is taken over a share of the line, and never over so little that a probe's noise counts. */
const WINDOW_SHARE = 0.02;
const LEAST_WINDOW_MS = 150_000;
const SHORTEST_MS = 75_000;
const SHORTEST_SHARE = 0.015;

/** The points of a drawn line: readings that can be temperatures of water, in order. */
export function linePoints(readings: readonly Reading[]): LinePoint[] {
  return readings.flatMap(({ atMs, tempC }, index) => {
    if (tempC === null || tempC < -20 || tempC > 115) return [];
    if (DRIVER_CODES.includes(tempC) && Math.abs((readings[index - 1]?.tempC ?? tempC) - tempC) > 5) return [];
    return [{ atMs, tempC }];
  });
}

/** Cuts a line into stretches that climb, hold or fall, for its hue. Short flickers are taken into their neighbour. */
export function stretchesOf(points: readonly LinePoint[]): Stretch[] {
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last || last.atMs <= first.atMs) return [];
  const spanMs = last.atMs - first.atMs;
  const halfMs = Math.max(LEAST_WINDOW_MS, spanMs * WINDOW_SHARE) / 2;
  const raw: Stretch[] = [];
  let low = 0;
  let high = 0;
  for (let i = 0; i + 1 < points.length; i += 1) {
    const { atMs } = points[i]!;
    while (low < i && points[low]!.atMs < atMs - halfMs) low += 1;
    while (high + 1 < points.length && points[high]!.atMs < atMs + halfMs) high += 1;
    const rise = meanBetween(points, i, high) - meanBetween(points, low, i);
    const doing = doingAt(rise, (points[high]!.atMs - points[low]!.atMs) / 2);
    const open = raw.at(-1);
    const toMs = points[i + 1]!.atMs;
    if (open?.doing === doing) open.toMs = toMs;
    else raw.push({ doing, fromMs: atMs, toMs });
  }
  return withoutFlickers(raw, Math.max(SHORTEST_MS, spanMs * SHORTEST_SHARE));
}

function doingAt(riseC: number, spanMs: number): Doing {
  const rateCPerMin = spanMs > 0 ? (riseC / spanMs) * 60_000 : 0;
  if (Math.abs(rateCPerMin) < HOLDING_C_PER_MIN) return 'holding';
  return rateCPerMin > 0 ? 'climbing' : 'falling';
}

function meanBetween(points: readonly LinePoint[], from: number, to: number): number {
  let sum = 0;
  for (let i = from; i <= to; i += 1) sum += points[i]!.tempC;
  return sum / (to - from + 1);
}

function withoutFlickers(stretches: Stretch[], shortestMs: number): Stretch[] {
  const kept: Stretch[] = [];
  for (const stretch of stretches) {
    const open = kept.at(-1);
    if (open && (open.doing === stretch.doing || stretch.toMs - stretch.fromMs < shortestMs)) open.toMs = stretch.toMs;
    else kept.push({ ...stretch });
  }
  return kept.reduce<Stretch[]>((joined, stretch) => {
    const open = joined.at(-1);
    if (open?.doing === stretch.doing) open.toMs = stretch.toMs;
    else joined.push(stretch);
    return joined;
  }, []);
}
