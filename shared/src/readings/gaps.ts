import type { Reading } from './reading.js';

export interface Gap {
  /** The last reading before it. */
  fromMs: number;
  /** The first reading after it. */
  toMs: number;
}

/**
 * Spans longer than `maxGapS` without a temperature, between the first and the last one. Readings without a temperature do
 * not end a gap. Expects readings in order of time.
 */
export function gaps(readings: readonly Reading[], maxGapS: number): Gap[] {
  const found: Gap[] = [];
  let fromMs: number | null = null;
  for (const { atMs, tempC } of readings) {
    if (tempC === null) continue;
    if (fromMs !== null && atMs - fromMs > maxGapS * 1000) found.push({ fromMs, toMs: atMs });
    fromMs = atMs;
  }
  return found;
}
