import type { Step } from '@steepfall/shared/sheets';
import { secondsLeft, type Timer } from '@steepfall/shared/timers';
import { currentStep, standingAlerts, type RunState } from '@steepfall/shared/runs';
import { formatDuration } from '@steepfall/shared/units';
import { PressButton } from '#components/press-button.tsx';
import { useLive, useRunState } from '#lib/run-store/run-context.tsx';
import type { LiveState } from '#lib/run-store/run-store.ts';
import { aboutParts, aboutText } from './sheet-words.ts';

/** The timer of the step that is on. */
function stepTimer(state: RunState): Timer | null {
  const current = currentStep(state);
  return state.timers.find(({ stepId }) => stepId !== null && stepId === current?.step.id) ?? null;
}

/** What the person waits for, and the timers they set themselves. */
export function Waiting({ onStop }: { onStop: (timerId: string) => void }) {
  const { timers } = useRunState();
  const own = timers.filter(({ stepId }) => stepId === null);
  return (
    <div className="waiting">
      <Countdown />
      {own.map((timer) => (
        <OwnTimer key={timer.id} timer={timer} onStop={() => onStop(timer.id)} />
      ))}
    </div>
  );
}

function OwnTimer({ timer, onStop }: { timer: Timer; onStop: () => void }) {
  const left = useLive(({ nowMs }) => formatDuration(secondsLeft(timer, nowMs)));
  return (
    <PressButton className="own-timer" onPress={onStop}>
      <span>{timer.label}</span>
      <span className="own-timer-left">{left}</span>
      <span className="foot-all">Stop</span>
    </PressButton>
  );
}

/** Large and alone: time left on the running timer, or until the liquid meets its level. */
function Countdown() {
  const state = useRunState();
  const timer = stepTimer(state);
  const hasLevel = useLive(({ view }) => view?.target != null);
  if (timer) {
    return (
      <div className="countdown" role="timer" aria-label={timer.label}>
        <p className="countdown-label">time left</p>
        <p className="countdown-figure">
          <TimerFigure timer={timer} />
        </p>
      </div>
    );
  }
  return hasLevel ? <CrossingCountdown isAwaited={isByTemperature(currentStep(state)?.step ?? null)} /> : null;
}

function TimerFigure({ timer }: { timer: Timer }) {
  const text = useLive(({ nowMs }) => formatDuration(secondsLeft(timer, nowMs)));
  return <span data-long={text.length > 5 || undefined}>{text}</span>;
}

function isByTemperature(step: Step | null): boolean {
  return step?.start.by === 'temperature' || step?.done.by === 'temperature';
}

/**
 * When line and level meet: the forecast of this instant. While there is none, what a standing alert for the level was raised with, as the
 * strip above says it too.
 */
function meetingAtMs(state: RunState, { view, nowMs }: LiveState): number | null {
  const forecast = view?.forecast;
  if (forecast?.kind === 'forecast') return forecast.atMs;
  if (!view?.target || forecast?.kind === 'crossed') return null;
  const { stepId } = view.target;
  const alert = standingAlerts(state).find(({ rule, ...of }) => rule === 'temperature' && of.stepId === stepId);
  return alert?.dueAtMs != null && alert.dueAtMs > nowMs ? alert.dueAtMs : null;
}

/** `isAwaited`: the step itself waits for the level. Otherwise a forecast is news, and that there is none is not. */
function CrossingCountdown({ isAwaited }: { isAwaited: boolean }) {
  const state = useRunState();
  const actStepId = useLive(({ view }) => view?.target?.actStepId ?? null);
  const kind = useLive(({ view }) => view?.forecast?.kind ?? null);
  const number = useLive((live) => {
    const atMs = meetingAtMs(state, live);
    return atMs === null ? null : aboutParts(Math.ceil((atMs - live.nowMs) / 1000)).number;
  });
  const unit = useLive((live) => {
    const atMs = meetingAtMs(state, live);
    return atMs === null ? '' : aboutParts(Math.ceil((atMs - live.nowMs) / 1000)).unit;
  });
  const spread = useLive(({ view, nowMs }) => {
    const forecast = view?.forecast;
    if (forecast?.kind !== 'forecast' || forecast.lateMs - forecast.earlyMs < 10_000) return null;
    const part = (atMs: number) => aboutText((atMs - nowMs) / 1000);
    return `between ${part(forecast.earlyMs)} and ${part(forecast.lateMs)}`;
  });
  const isTooLate = useLive(({ view }) => view?.estimate.status === 'stale' || view?.estimate.status === 'lost');
  const current = currentStep(state);
  const act = state.steps.find(({ step }) => step.id === actStepId)?.step;
  const what = act && act.id !== current?.step.id ? `${act.title}, in about` : 'comes up in about';
  if (number === null && !isAwaited) return null;
  if (isTooLate) {
    return (
      <div className="countdown">
        <p className="countdown-label">No reading comes in, so nothing is forecast. Watch a thermometer by hand.</p>
      </div>
    );
  }
  if (number === null) {
    return (
      <div className="countdown">
        <p className="countdown-label">{noFigureText(kind)}</p>
      </div>
    );
  }
  return (
    <div className="countdown" role="timer" aria-label={what}>
      <p className="countdown-label">{what}</p>
      <p className="countdown-figure">
        {number}
        {unit ? <span className="countdown-unit">{unit}</span> : null}
      </p>
      {spread ? <p className="countdown-label">{spread}</p> : null}
    </div>
  );
}

function noFigureText(kind: string | null): string {
  if (kind === 'crossed') return 'The level is reached.';
  if (kind === 'never') return 'As it goes now, the liquid does not get there.';
  return 'Too early to say when.';
}

/** How long ago the last step was done. */
export function LastDone() {
  const state = useRunState();
  const last = state.steps.find(({ step }) => step.id === state.doneOrder.at(-1));
  const doneAtMs = last?.doneAtMs ?? null;
  const ago = useLive(({ nowMs }) =>
    doneAtMs === null ? null : formatDuration(Math.max(0, Math.floor((nowMs - doneAtMs) / 1000))),
  );
  if (!last || ago === null) return null;
  return (
    <p className="last-done tabular-nums">
      {last.step.title}: {ago} ago
    </p>
  );
}
