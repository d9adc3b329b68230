/** A timer is a deadline, never a count: what is left is a subtraction, right after any sleep or reload. */
export interface Timer {
  id: string;
  /** What the person waits for: "steep", "sample cools". */
  label: string;
  /** The step that the timer belongs to; `null` for one a person set by hand. */
  stepId: string | null;
  /** Run clock, epoch ms. */
  startedAtMs: number;
  /** Run clock, epoch ms. */
  endsAtMs: number;
}

/** Seconds left at the run time `nowMs`, rounded up so that "0:00" means over; negative once over. */
export function secondsLeft(timer: Pick<Timer, 'endsAtMs'>, nowMs: number): number {
  const left = Math.ceil((timer.endsAtMs - nowMs) / 1000);
  return left === 0 ? 0 : left;
}

/** True from the deadline on. */
export function isOver(timer: Pick<Timer, 'endsAtMs'>, nowMs: number): boolean {
  return nowMs >= timer.endsAtMs;
}
