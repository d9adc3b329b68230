import { correctedTempC, type ProbeCorrection } from '@steepfall/shared/figures';
import type { Reading } from '@steepfall/shared/readings';

export interface CorrectedReading extends Reading {
  /** What the probe sent, where a correction made something else of it. */
  rawC: number | null;
}

/** Beyond these it is no temperature but a code of the driver, which the watch must know again. */
const LOWEST_C = -20;
const HIGHEST_C = 115;
/** What a one-wire chip shows before it has measured; a real 85.0 has others near it. */
const POWER_ON_C = 85;
const NEAR_C = 5;

/** Readings of one probe with its correction, in the order they came in; `lastShownC` is what it showed before the first of them. */
export function corrected(
  readings: readonly Reading[],
  correction: ProbeCorrection | null,
  lastShownC: number | null,
): CorrectedReading[] {
  let before = lastShownC;
  return readings.map(({ atMs, tempC }) => {
    const isCode = tempC === null || tempC < LOWEST_C || tempC > HIGHEST_C || isPowerOn(tempC, before);
    if (tempC !== null && !isCode) before = tempC;
    if (isCode || correction === null) return { atMs, tempC, rawC: null };
    return { atMs, tempC: correctedTempC(tempC, correction), rawC: tempC };
  });
}

function isPowerOn(tempC: number, before: number | null): boolean {
  return tempC === POWER_ON_C && (before === null || Math.abs(tempC - before) > NEAR_C);
}
