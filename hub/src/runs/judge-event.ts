import { hubOnlyEventTypes } from '@steepfall/shared/contracts';
import { errorsOfIssues, problem, type Problem } from '@steepfall/shared/problems';
import { runEventSchema, type RunEvent } from '@steepfall/shared/runs';
import { runTimeAt, type RunClock } from '@steepfall/shared/timers';

/** What may be sent to a run: anything with an id, so that one event that cannot be read does not spoil the others. */
export interface SentEvent {
  id: string;
  [key: string]: unknown;
}

export interface Courtroom {
  runId: string;
  isRehearsal: boolean;
  clock: RunClock;
  /** Hub wall time. */
  nowMs: number;
  /** Ids of everybody who is or was in the house: an old fact of somebody who left is still a fact. */
  memberIds: ReadonlySet<string>;
  /** The hub itself writes: it may write every kind, and nobody needs to have done it. */
  isHub: boolean;
}

export type Verdict = { event: RunEvent } | { problem: Problem };

/** How long a change of rate may be on its way, wall time. */
const CLOCK_SLACK_MS = 2_000;

/**
 * Whether an event may be written: its shape, its run, who acted, and whether a device may write this kind at all. Whether it makes sense
 * in the run is not asked: what happened on the floor is a fact, and the fold shows what contradicts it.
 */
export function judgeEvent(sent: SentEvent, room: Courtroom): Verdict {
  const parsed = runEventSchema.safeParse(sent);
  if (!parsed.success) {
    const errors = errorsOfIssues(parsed.error.issues);
    return { problem: problem('not-valid', 'The event does not fit.', { errors }) };
  }
  const event = parsed.data;
  if (event.runId !== room.runId) return invalid('/runId', 'The event belongs to another run.');
  if (room.isHub) return { event };
  if (hubOnlyEventTypes.includes(event.type))
    return { problem: problem('not-allowed', `Only the hub itself writes "${event.type}".`) };
  if (event.by === null && !isFoundByWatch(event)) return invalid('/by', 'Say who did it.');
  if (event.by !== null && !room.memberIds.has(event.by)) return invalid('/by', 'Nobody of this house has this id.');
  if (event.type === 'clock.changed') return judgeClock(event, room);
  return { event };
}

/** Facts that need no person: the hub and every tablet find them alike. */
function isFoundByWatch(event: RunEvent): boolean {
  if (event.type === 'step.done') return event.payload.cause !== 'hand';
  return event.type === 'alert.raised' || event.type === 'alert.cleared';
}

/** The clock is the hub's: only a rehearsal has a fast one, and at the instant it is changed run time goes on without a jump. */
function judgeClock(event: RunEvent & { type: 'clock.changed' }, { isRehearsal, clock, nowMs }: Courtroom): Verdict {
  if (!isRehearsal) return { problem: problem('not-allowed', 'Only a rehearsal has a fast clock.') };
  const changed = event.payload.clock;
  const jumpMs = Math.abs(runTimeAt(changed, nowMs) - runTimeAt(clock, nowMs));
  if (jumpMs > CLOCK_SLACK_MS * Math.max(changed.rate, clock.rate))
    return { problem: problem('changed-meanwhile', 'The clock was changed elsewhere. Choose the rate again.') };
  return { event };
}

function invalid(pointer: string, detail: string): Verdict {
  return { problem: problem('not-valid', detail, { errors: [{ pointer, detail }] }) };
}
