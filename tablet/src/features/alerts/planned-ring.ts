import { armedIn, isFault, spokenClips, type Alert, type Armed, type RunState } from '@steepfall/shared/runs';
import type { PlannedRing } from '#lib/audio/alarm-sounds.ts';
import type { LiveState } from '#lib/run-store/run-store.ts';
import { alertStageId, callingHere } from '#lib/run-store/take-over.ts';

/** A forecast whose ends lie further apart is not put on the audio clock. */
const SURE_WITHIN_MS = 12_000;
/** The watch says "now" itself in a page that is awake; the plan is for one that is not, and comes a little after it. */
const AFTER_THE_WATCH_S = 1;

type Known = Pick<LiveState, 'nowMs' | 'view'>;

/** When this one says "now", run clock: as long before the moment as a hand needs. Null while nobody can be sure. */
function callAtMs(item: Armed, { view }: Known): number | null {
  const reachMs = (item.actStep?.reachS ?? 0) * 1000;
  if (item.by === 'timer') return item.endsAtMs - reachMs;
  const forecast = view?.target?.stepId === item.stepId ? view.forecast : null;
  if (forecast?.kind !== 'forecast' || forecast.lateMs - forecast.earlyMs > SURE_WITHIN_MS) return null;
  return forecast.atMs - reachMs;
}

function alertOf(item: Armed): Alert {
  const { by, key, stepId, actStep } = item;
  return {
    key,
    crossing: by === 'timer' ? 1 : item.crossing,
    rule: by,
    stage: 'now',
    stepId,
    actStepId: actStep?.id ?? null,
    targetC: by === 'timer' ? null : item.tempC,
    direction: by === 'timer' ? null : item.direction,
    dueAtMs: null,
    raisedAtMs: 0,
    tempC: null,
    acknowledgedAtMs: null,
    acknowledgedBy: null,
    clearedAtMs: null,
    shelvedUntilMs: null,
    shelvedReason: null,
    isStanding: true,
  };
}

const isCalled = (stage: Alert['stage']) => stage === 'now' || stage === 'missed';

/** The next "now" that time alone will bring, as it will be raised; null when there is none, or another one rings. */
export function plannedRing(state: RunState, live: Known, unit: 'C' | 'F'): PlannedRing | null {
  const isTaken = callingHere(state).some((alert) => !isFault(alert) && isCalled(alert.stage));
  if (state.status !== 'running' || isTaken) return null;
  const rate = state.clock?.rate ?? 1;
  const calls = armedIn(state).flatMap((item) => {
    const atMs = callAtMs(item, live);
    const alert = alertOf(item);
    const isRaised = state.alerts.some(
      ({ key, crossing, stage }) => key === alert.key && crossing === alert.crossing && isCalled(stage),
    );
    if (atMs === null || isRaised) return [];
    const inS = (atMs - live.nowMs) / 1000 / rate + (item.by === 'timer' ? 0 : AFTER_THE_WATCH_S);
    return [{ alert, inS }];
  });
  const [next] = calls.sort((a, b) => a.inS - b.inS);
  if (!next) return null;
  const { alert, inS } = next;
  return { inS, ring: { level: 'now', id: alertStageId(alert), say: spokenClips(state, alert, unit) } };
}
