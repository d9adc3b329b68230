import type { RunState } from '@steepfall/shared/runs';
import { wallTimeAt } from '@steepfall/shared/timers';

export const LONGEST_MS = 24 * 3_600_000;
/** A glance afterwards, for who stood up late. */
const AFTER_END_MS = 3_600_000;

/** Until when a link opens its run: hub wall time. */
export function openUntilMs(
  { expiresAtMs }: { expiresAtMs: number },
  { status, endedAtMs, clock }: Pick<RunState, 'status' | 'endedAtMs' | 'clock'>,
): number {
  if (status !== 'ended' || endedAtMs === null || clock === null) return expiresAtMs;
  return Math.min(expiresAtMs, wallTimeAt(clock, endedAtMs) + AFTER_END_MS);
}
