import type { Reading } from '@steepfall/shared/readings';
import type { ForecastPoint } from '@steepfall/shared/watch';
import type { Level } from './levels.ts';

const MINUTE_MS = 60_000;
const PASTS_MIN = [3, 5, 10, 15];
const FUTURES_MIN = [2, 3, 4, 6, 10, 15];
/** Room for what is to come, as a share of the past: that is where the person stands and waits. */
const LEAST_AHEAD_SHARE = 0.6;
/** Axis ends lie on these, so that the picture does not breathe with every reading. */
const STEP_C = 5;
const LEAST_SPAN_C = 10;
const WORDS_PX = 22;

/** Where time and temperature fall on the drawing. */
export interface FallFrame {
  nowMs: number;
  fromMs: number;
  toMs: number;
  lowC: number;
  highC: number;
  x: (atMs: number) => number;
  y: (tempC: number) => number;
}

export interface FallFrameInput {
  width: number;
  height: number;
  nowMs: number;
  readings: readonly Reading[];
  /** The level that is waited for, and when it will be met. */
  target: { tempC: number } | null;
  crossingAtMs: number | null;
  curve: readonly ForecastPoint[];
  levels: readonly Level[];
}

function firstAtLeast(choices: readonly number[], wanted: number): number {
  return choices.find((choice) => choice >= wanted) ?? choices.at(-1)!;
}

/** The window of the fall line: up to a quarter of an hour back, and as far ahead as the crossing is. */
export function fallFrame(input: FallFrameInput): FallFrame {
  const { width, height, nowMs, readings, target, crossingAtMs, levels } = input;
  const firstMs = readings[0]?.atMs ?? nowMs;
  const pastMs = firstAtLeast(PASTS_MIN, (nowMs - firstMs) / MINUTE_MS) * MINUTE_MS;
  const aheadMin = crossingAtMs === null ? 0 : ((crossingAtMs - nowMs) / MINUTE_MS) * 1.3;
  const leastAheadMin = (pastMs / MINUTE_MS) * LEAST_AHEAD_SHARE;
  const futureMs = Math.min(pastMs, firstAtLeast(FUTURES_MIN, Math.max(aheadMin, leastAheadMin)) * MINUTE_MS);
  const fromMs = nowMs - pastMs;
  const toMs = nowMs + futureMs;

  const seen = readings.flatMap(({ atMs, tempC }) =>
    atMs >= fromMs && tempC !== null && tempC > -20 && tempC < 115 ? [tempC] : [],
  );
  const ahead = input.curve.filter(({ atMs }) => atMs <= toMs && (crossingAtMs === null || atMs <= crossingAtMs));
  const recent = levels.filter(({ doneAtMs }) => doneAtMs !== null && doneAtMs >= fromMs).map(({ tempC }) => tempC);
  const shown = [...seen, ...ahead.map(({ tempC }) => tempC), ...recent, ...(target ? [target.tempC] : [])];
  const least = shown.length > 0 ? Math.min(...shown) : 20;
  const most = shown.length > 0 ? Math.max(...shown) : 30;
  const pad = Math.max(1, (most - least) * 0.1);
  // Words under the lowest level need room above the times, on a low drawing more of it.
  const below = height > 2 * WORDS_PX ? ((most - least) * WORDS_PX) / (height - WORDS_PX) : 0;
  let lowC = Math.floor((least - Math.max(pad, below)) / STEP_C) * STEP_C;
  let highC = Math.ceil((most + pad) / STEP_C) * STEP_C;
  if (highC - lowC < LEAST_SPAN_C) highC = lowC + LEAST_SPAN_C;
  if (lowC < -10) lowC = -10;

  return {
    nowMs,
    fromMs,
    toMs,
    lowC,
    highC,
    x: (atMs) => ((atMs - fromMs) / (toMs - fromMs)) * width,
    y: (tempC) => ((highC - tempC) / (highC - lowC)) * height,
  };
}

export type Doing = 'climbing' | 'holding' | 'falling';

const SLOPE_OVER_MS = 30_000;
/** Below 0.3 degrees a minute over half a minute is holding. */
const HOLDING_C = 0.15;

export interface Stroke {
  doing: Doing;
  points: { x: number; y: number }[];
}

/** The readings as strokes of one doing each; a silence of more than `gapMs` breaks the line. */
export function strokesOf(readings: readonly Reading[], frame: FallFrame, gapMs: number): Stroke[] {
  const strokes: Stroke[] = [];
  const good = readings.filter(
    ({ atMs, tempC }) => atMs >= frame.fromMs && tempC !== null && tempC > -20 && tempC < 115,
  );
  let behind = 0;
  let current: Stroke | null = null;
  let doing: Doing = 'holding';
  for (const [index, { atMs, tempC }] of good.entries()) {
    while (behind < index && atMs - good[behind]!.atMs > SLOPE_OVER_MS) behind += 1;
    const before = good[index - 1];
    const isBroken = before !== undefined && atMs - before.atMs > gapMs;
    if (isBroken) behind = index;
    const changeC = tempC! - good[behind]!.tempC!;
    if (index > behind) doing = Math.abs(changeC) < HOLDING_C ? 'holding' : changeC > 0 ? 'climbing' : 'falling';
    const point = { x: frame.x(atMs), y: frame.y(tempC!) };
    if (!current || isBroken || current.doing !== doing) {
      // Strokes share the point where they meet, so that the line has no holes.
      const joint: Stroke['points'] = current && !isBroken ? [current.points.at(-1)!] : [];
      current = { doing, points: [...joint, point] };
      strokes.push(current);
    } else current.points.push(point);
  }
  return strokes;
}

export interface LevelMark {
  key: string;
  tempC: number;
  y: number;
  /** Where the line meets it; at the right end when nobody knows. */
  x: number;
  label: string;
  /** Left end of the label. */
  labelX: number;
  /** Above the level, or below it where the line passes above. */
  isBelow: boolean;
  isDone: boolean;
}

const LABEL_GAP_PX = 30;
const LABEL_PX = 12;
const CHARACTER_PX = 11;
const LEFT_MARGIN_PX = 52;
const MARK_PX = 16;
const UPPER_MARGIN_PX = 2;
const LOWER_MARGIN_PX = 6;

/** A falling line leaves the upper right and the lower left of its mark free, a rising one the upper left and the lower right. */
function labelPlace(
  x: number,
  label: string,
  direction: Level['direction'],
  width: number,
): { labelX: number; isBelow: boolean } {
  const room = label.length * CHARACTER_PX;
  const right = { x: x + MARK_PX, fits: x + MARK_PX + room <= width };
  const left = { x: x - MARK_PX - room, fits: x - MARK_PX - room >= LEFT_MARGIN_PX };
  const [above, below] = direction === 'falling' ? [right, left] : [left, right];
  const place = above.fits ? above : below;
  return { labelX: Math.max(LEFT_MARGIN_PX, Math.min(place.x, width - room)), isBelow: place === below };
}

/** The levels that are in the picture, what is to come first; of two that would overprint the later one goes. */
export function levelMarks(
  levels: readonly Level[],
  frame: FallFrame,
  size: { width: number; height: number },
  next: { key: string; crossingAtMs: number | null; about: string | null } | null,
): LevelMark[] {
  const rank = ({ key, isDone }: Level) => (key === next?.key ? 0 : isDone ? 2 : 1);
  const marks: LevelMark[] = [];
  for (const level of [...levels].sort((a, b) => rank(a) - rank(b))) {
    const { key, tempC, text, isDone, doneAtMs, direction } = level;
    const isNext = key === next?.key;
    const lowest = size.height - LOWER_MARGIN_PX;
    const trueY = frame.y(tempC);
    // On a low drawing the level that is waited for may lie at the very edge: it is shown there, never left out.
    const y = isNext ? Math.min(lowest, Math.max(UPPER_MARGIN_PX, trueY)) : trueY;
    if (y < UPPER_MARGIN_PX || y > lowest) continue;
    if (marks.some((mark) => Math.abs(mark.y - y) < LABEL_GAP_PX)) continue;
    const atMs = isDone ? doneAtMs : isNext ? next.crossingAtMs : null;
    if (isDone && (atMs === null || atMs < frame.fromMs)) continue;
    const rightmost = size.width - 12;
    const x = Math.min(rightmost, Math.max(LEFT_MARGIN_PX, atMs === null ? rightmost : frame.x(atMs)));
    const label = isNext && next.about ? `${text}, ${next.about}` : text;
    // At the right end no line comes near: the label stands above, to the left.
    const place = labelPlace(x, label, x === rightmost ? 'rising' : direction, size.width);
    // Under the upper edge there is no room for words above the level.
    marks.push({ key, tempC, y, x, label, isDone, ...place, isBelow: place.isBelow || y < LABEL_PX });
  }
  return marks;
}
