import { z } from 'zod';

/**
 * Maps wall time to the clock of a run. In a real run the rate is 1 and both anchors are equal, so run time is wall
 * time; in a rehearsal run time moves `rate` times as fast.
 */
export const runClockSchema = z
  .strictObject({
    /** Hub wall time at which the mapping was set, epoch ms. */
    anchorWallMs: z.int().nonnegative(),
    /** Run time at that instant, epoch ms. */
    anchorRunMs: z.int().nonnegative(),
    rate: z.number().min(1).max(60),
  })
  .meta({ id: 'RunClock' });
export type RunClock = z.infer<typeof runClockSchema>;

/** A clock that shows wall time (a real run). */
export function wallClock(wallMs: number): RunClock {
  return { anchorWallMs: wallMs, anchorRunMs: wallMs, rate: 1 };
}

/** Run time in epoch ms at the given hub wall time. */
export function runTimeAt(clock: RunClock, wallMs: number): number {
  return Math.round(clock.anchorRunMs + (wallMs - clock.anchorWallMs) * clock.rate);
}

/** Hub wall time in epoch ms at which the run clock shows `runMs`. */
export function wallTimeAt(clock: RunClock, runMs: number): number {
  return Math.round(clock.anchorWallMs + (runMs - clock.anchorRunMs) / clock.rate);
}

/** The same instant at another rate: run time does not jump when the rate changes. */
export function clockAtRate(clock: RunClock, rate: number, wallMs: number): RunClock {
  return { anchorWallMs: wallMs, anchorRunMs: runTimeAt(clock, wallMs), rate };
}
