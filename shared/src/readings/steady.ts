import type { Reading } from './reading.js';

export interface Steadiness {
  isSteady: boolean;
  /** Mean over the last while, °C; null without a reading in it. */
  meanC: number | null;
  /** Highest minus lowest over it, K. */
  rangeK: number;
}

/** Fewer do not tell steady from stuck between two readings. */
const LEAST_READINGS = 4;

/**
 * Whether the newest readings stand still.
 *
 * @param readings in order of time, of one probe.
 * @param nowMs the end of the span that is looked at; what is later is left out.
 * @param options `spanS` how long it must have stood still, above 0 s; `withinK` how much it may have moved, 0 or more.
 */
export function steadiness(
  readings: readonly Reading[],
  nowMs: number,
  { spanS, withinK }: { spanS: number; withinK: number },
): Steadiness {
  const fromMs = nowMs - spanS * 1000;
  const temps: number[] = [];
  let firstMs = Infinity;
  let hasDropout = false;
  for (const { atMs, tempC } of readings) {
    if (atMs > nowMs || atMs < fromMs) continue;
    if (tempC === null) hasDropout = true;
    else {
      temps.push(tempC);
      firstMs = Math.min(firstMs, atMs);
    }
  }
  if (temps.length === 0) return { isSteady: false, meanC: null, rangeK: 0 };
  const rangeK = Math.max(...temps) - Math.min(...temps);
  const meanC = temps.reduce((sum, tempC) => sum + tempC, 0) / temps.length;
  // The span must be covered: three readings of a probe that has just woken up are not a steady quarter of a minute.
  const isCovered = temps.length >= LEAST_READINGS && firstMs - fromMs < 0.25 * spanS * 1000;
  return { isSteady: isCovered && !hasDropout && rangeK <= withinK + 1e-9, meanC, rangeK };
}
