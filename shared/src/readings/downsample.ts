import type { Reading } from './reading.js';

/**
 * Thins readings for drawing: time is cut into `buckets` equal spans, and of each span the lowest, the highest and the first
 * missing reading are kept, with the very first and last of all. A spike of one sample survives, and so does a dropout.
 * Expects readings in order of time; gives them back as they are when there are no more than two a bucket.
 *
 * @param buckets a whole number, 1 or more; about the width of the drawing in pixels.
 * @throws RangeError when `buckets` is not such a number.
 */
export function downsampleMinMax(readings: readonly Reading[], buckets: number): Reading[] {
  if (!Number.isInteger(buckets) || buckets < 1) {
    throw new RangeError(`buckets must be a whole number of 1 or more, got ${buckets}`);
  }
  const first = readings[0];
  const last = readings.at(-1);
  if (first === undefined || last === undefined || readings.length <= 2 * buckets) return [...readings];
  const spanMs = Math.max(1, last.atMs - first.atMs);
  const bucketOf = (atMs: number) => Math.min(buckets - 1, Math.floor(((atMs - first.atMs) / spanMs) * buckets));

  const kept = new Set<number>([0, readings.length - 1]);
  let start = 0;
  while (start < readings.length) {
    const bucket = bucketOf(readings[start]!.atMs);
    let end = start;
    while (end < readings.length && bucketOf(readings[end]!.atMs) === bucket) end += 1;
    for (const index of extremes(readings, start, Math.max(end, start + 1))) kept.add(index);
    start = Math.max(end, start + 1);
  }
  return [...kept].sort((a, b) => a - b).map((index) => readings[index]!);
}

/** Indices of the lowest, the highest and the first missing reading in [start, end). */
function extremes(readings: readonly Reading[], start: number, end: number): number[] {
  let low = -1;
  let high = -1;
  let missing = -1;
  for (let i = start; i < end; i += 1) {
    const { tempC } = readings[i]!;
    if (tempC === null) {
      if (missing < 0) missing = i;
      continue;
    }
    if (low < 0 || tempC < readings[low]!.tempC!) low = i;
    if (high < 0 || tempC > readings[high]!.tempC!) high = i;
  }
  return [low, high, missing].filter((index) => index >= 0);
}
