import type { LogEntry, RunEvent, RunState } from '@steepfall/shared/runs';
import type { StepKind } from '@steepfall/shared/sheets';
import type { AnsweredCall } from '@steepfall/shared/watch';

/** One call of the ladder that a person answered. */
export interface MemberCall extends AnsweredCall {
  memberId: string;
  atMs: number;
}

/** Steps whose moment passes: something goes in or comes out. */
const HURRIES: ReadonlySet<StepKind> = new Set(['add', 'catch', 'remove'] as const);

type Raised = Extract<RunEvent, { type: 'alert.raised' }>;

/**
 * The calls of one run that were answered by hand, each with who did it and how long after `now`, in the order of the acts. What was taken back
 * counts as done when it was done at last; what was done before its call answers none. Deadlines are left out, since who waits for 0:00 shows
 * patience and not reach, and so is what does not hurry, such as the transfer.
 */
export function callsOf(log: readonly LogEntry[], state: RunState): MemberCall[] {
  const raised = log.filter(
    (entry): entry is Raised => entry.type === 'alert.raised' && (entry as Raised).payload.rule === 'temperature',
  );
  const calls = state.steps.flatMap(({ step, cause, doneAtMs, doneBy }) => {
    if (!HURRIES.has(step.kind) || cause !== 'hand' || doneAtMs === null || doneBy === null) return [];
    const before = raised.filter(({ payload, atMs }) => payload.actStepId === step.id && atMs <= doneAtMs);
    const now = before.findLast(({ payload }) => payload.stage === 'now');
    if (!now) return [];
    const { key, crossing } = now.payload;
    const isMissed = before.some(
      ({ payload }) => payload.stage === 'missed' && payload.key === key && payload.crossing === crossing,
    );
    return [{ memberId: doneBy, atMs: doneAtMs, waitedS: (doneAtMs - now.atMs) / 1000, isMissed }];
  });
  return calls.sort((a, b) => a.atMs - b.atMs);
}
