/** Brightness of a small picture, row by row, 0 to 255. */
export interface Frame {
  atMs: number;
  width: number;
  height: number;
  light: Uint8ClampedArray;
}

interface Sighting {
  atMs: number;
  /** Where the motion is: 0 at one edge, 1 at the other. */
  x: number;
}

export interface WaveState {
  last: Frame | null;
  /** Motion of the last moments, the newest at the end. */
  seen: readonly Sighting[];
  /** Nothing counts before this: the arm goes down, the person steps back. */
  restUntilMs: number;
}

export const stillWave: WaveState = { last: null, seen: [], restUntilMs: 0 };

/** A cell moved when its brightness changed by more than this against the whole picture. */
const CHANGE = 24;
/** Share of the picture that moves with an arm near the tablet. A hand far away, or somebody at the back, is less. */
const LEAST_SHARE = 0.06;
/** More than this is light that went on, or a tablet that was carried. */
const MOST_SHARE = 0.75;
const EDGE = 0.34;
/** There and back again, no slower: a person who walks past takes longer, and does not come back. */
const LONGEST_MS = 2_000;
const REST_MS = 2_500;

function mean(light: Uint8ClampedArray): number {
  return light.reduce((sum, value) => sum + value, 0) / Math.max(1, light.length);
}

/** Where two pictures differ: the middle of it along the width, or null when too little or too much differs. */
function motionX(before: Frame, now: Frame): number | null {
  const shift = mean(now.light) - mean(before.light);
  let count = 0;
  let sumX = 0;
  for (let index = 0; index < now.light.length; index += 1) {
    const change = (now.light[index] ?? 0) - (before.light[index] ?? 0) - shift;
    if (Math.abs(change) < CHANGE) continue;
    count += 1;
    sumX += index % now.width;
  }
  const share = count / Math.max(1, now.light.length);
  if (share < LEAST_SHARE || share > MOST_SHARE) return null;
  return sumX / count / Math.max(1, now.width - 1);
}

/** Edges that the motion came to, in order, each once: "left, right, left" is a wave. */
function edgesOf(seen: readonly Sighting[]): ('left' | 'right')[] {
  const edges: ('left' | 'right')[] = [];
  for (const { x } of seen) {
    const edge = x < EDGE ? 'left' : x > 1 - EDGE ? 'right' : null;
    if (edge && edge !== edges.at(-1)) edges.push(edge);
  }
  return edges;
}

/**
 * Sees a wave: something large that goes across the picture and back within two seconds. Works on a few hundred brightnesses; knows no
 * face, keeps no picture.
 */
export function seeFrame(state: WaveState, frame: Frame): { state: WaveState; isWave: boolean } {
  const { last, restUntilMs } = state;
  const isSameShape = last?.width === frame.width && last.light.length === frame.light.length;
  const x = last && isSameShape ? motionX(last, frame) : null;
  const recent = state.seen.filter(({ atMs }) => frame.atMs - atMs <= LONGEST_MS);
  const seen = x === null ? recent : [...recent, { atMs: frame.atMs, x }];
  const isWave = frame.atMs >= restUntilMs && edgesOf(seen).length >= 3;
  return isWave
    ? { state: { last: frame, seen: [], restUntilMs: frame.atMs + REST_MS }, isWave }
    : { state: { last: frame, seen, restUntilMs }, isWave };
}
