import { isChattering } from './alert-priority.js';
import { derivedEvent } from './derived-event.js';
import type { AlertRule, RunEvent } from './events.js';
import type { Alert, RunState } from './state.js';

/** Heard and still true after this long, it calls once more. */
export const RECALL_MS = 300_000;
/** What came and went three times in a minute is held until it has been away for a minute. */
const STEADY_MS = 60_000;

/** How something stands that helps to watch, as one device sees it at this moment. */
export interface FaultSight {
  rule: Exclude<AlertRule, 'temperature' | 'timer'>;
  /** Names the fault on every device: "signal", "hub:station-1f". */
  key: string;
  isTrue: boolean;
  /** For how long it has been so without a break. */
  heldMs: number;
  /** Before it is raised: what mends itself needs nobody. */
  onDelayMs: number;
  /** Before it is cleared: a blip of health is no health. */
  offDelayMs: number;
  /** The step that waits while it lasts. */
  stepId: string | null;
}

interface FaultPlace {
  runId: string;
  station: string;
  /** Run clock. */
  nowMs: number;
}

/**
 * What follows from a fault that is seen, or no longer seen: raised after its on-delay, cleared after its off-delay. It calls once more when it
 * was heard five minutes ago or put aside until now, and is still true. Ids are derived, so that two devices that see it write it once.
 *
 * @see on-delay, off-delay, re-alarm, shelving and chattering as in ISA-18.2 and EEMUA 191.
 */
export function faultEvents(state: RunState, sight: FaultSight, place: FaultPlace): RunEvent[] {
  const { key, isTrue, heldMs, onDelayMs, offDelayMs } = sight;
  const own = state.alerts.filter((alert) => alert.key === key).sort((a, b) => a.crossing - b.crossing);
  const open = own.filter(({ clearedAtMs }) => clearedAtMs === null);
  const last = open.at(-1);
  const rate = state.clock?.rate ?? 1;

  if (!isTrue) {
    const waitMs = isUnsteady(own, rate) ? Math.max(offDelayMs, STEADY_MS) : offDelayMs;
    if (!last || heldMs < waitMs) return [];
    return open.map(({ crossing }) =>
      derivedEvent(place, 'alert.cleared', `${key}/${crossing}`, place.nowMs, { key, crossing }),
    );
  }
  const isDue = last ? callsAgain(last, place.nowMs, rate) : heldMs >= onDelayMs;
  return isDue ? [raised(sight, place, (own.at(-1)?.crossing ?? 0) + 1)] : [];
}

function callsAgain({ shelvedUntilMs, acknowledgedAtMs }: Alert, nowMs: number, rate: number): boolean {
  if (shelvedUntilMs !== null) return nowMs >= shelvedUntilMs;
  return acknowledgedAtMs !== null && nowMs - acknowledgedAtMs >= RECALL_MS * rate;
}

/** A second call for one that never went away is no coming and going. */
function isUnsteady(own: readonly Alert[], rate: number): boolean {
  const comings = own.filter((_, index) => index === 0 || own[index - 1]?.clearedAtMs !== null);
  return isChattering(comings.slice(-3).map(({ raisedAtMs }) => raisedAtMs / rate));
}

function raised({ rule, key, stepId }: FaultSight, place: FaultPlace, crossing: number): RunEvent {
  return derivedEvent(place, 'alert.raised', `${key}/${crossing}/now`, place.nowMs, {
    key,
    crossing,
    rule,
    stage: 'now',
    stepId,
    actStepId: null,
    tempC: null,
    targetC: null,
    direction: null,
    dueAtMs: null,
  });
}
