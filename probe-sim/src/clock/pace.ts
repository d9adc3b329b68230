import { runTimeAt, wallTimeAt, type RunClock } from '@steepfall/shared/timers';

/**
 * Ties simulated time (ms from the start of a kettle or a trace) to the stamps of readings and to the wall clock of the hub.
 * All in ms.
 */
export interface Pace {
  /** `atMs` of a reading taken at a simulated instant. */
  stampMs(simulatedMs: number): number;
  /** Hub wall time at which that instant has come. */
  dueWallMs(simulatedMs: number): number;
  /** Simulated instant at a hub wall time. */
  simulatedMs(wallMs: number): number;
}

/**
 * A device that stamps with its wall clock, as real ones do. At a rate above 1 the trace is squeezed: a second of it takes, and
 * is stamped as, 1/rate of a second.
 *
 * @param startWallMs when it starts to play.
 * @param startStampMs stamp of simulated 0; the same instant unless an older trace is told again.
 */
export function wallPace(startWallMs: number, rate: number, startStampMs: number = startWallMs): Pace {
  checkRate(rate);
  return {
    stampMs: (simulatedMs) => Math.round(startStampMs + simulatedMs / rate),
    dueWallMs: (simulatedMs) => startWallMs + simulatedMs / rate,
    simulatedMs: (wallMs) => (wallMs - startWallMs) * rate,
  };
}

/**
 * A device on the clock of a run, which may be fast: readings keep their spacing, and are due when the run clock gets there.
 *
 * @param startRunMs run time of simulated 0.
 */
export function runClockPace(clock: RunClock, startRunMs: number): Pace {
  return {
    stampMs: (simulatedMs) => Math.round(startRunMs + simulatedMs),
    dueWallMs: (simulatedMs) => wallTimeAt(clock, startRunMs + simulatedMs),
    simulatedMs: (wallMs) => runTimeAt(clock, wallMs) - startRunMs,
  };
}

function checkRate(rate: number): void {
  if (!(rate >= 1 && rate <= 60)) throw new RangeError(`A rate is between 1 and 60, got ${rate}.`);
}
