import { usualReachS, type RunSheet } from '@steepfall/shared/sheets';

/** The sheet timed for the person who starts it. A step that was given a reach of its own keeps it. */
export function withReach(sheet: RunSheet, reachS: number | null): RunSheet {
  if (reachS === null) return sheet;
  return { ...sheet, steps: sheet.steps.map((step) => (step.reachS === usualReachS ? { ...step, reachS } : step)) };
}
