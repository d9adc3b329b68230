import { secondsLeft, type Timer } from '@steepfall/shared/timers';
import { currentStep, type RunState } from '@steepfall/shared/runs';
import { formatDuration } from '@steepfall/shared/units';
import { useLive, useRunState } from '#lib/run-store/run-context.tsx';
import { aboutText } from './sheet-words.ts';

/** The timer that counts most: the one of the step, or the next of those set by hand. */
export function leadingTimer(state: RunState): Timer | null {
  const current = currentStep(state);
  const own = state.timers.find(({ stepId }) => stepId !== null && stepId === current?.step.id);
  if (own) return own;
  return [...state.timers].sort((a, b) => a.endsAtMs - b.endsAtMs)[0] ?? null;
}

/** Large and alone: time left on the running timer, or until the liquid meets its level. */
export function Countdown() {
  const state = useRunState();
  const timer = leadingTimer(state);
  const current = currentStep(state);
  const hasLevel = useLive(({ view }) => view?.target != null);
  if (timer && (timer.stepId === current?.step.id || !hasLevel)) {
    return (
      <div className="countdown" role="timer" aria-label={timer.label}>
        <p className="countdown-label">{timer.stepId === null ? timer.label : 'time left'}</p>
        <p className="countdown-figure">
          <TimerFigure timer={timer} />
        </p>
      </div>
    );
  }
  return hasLevel ? <CrossingCountdown /> : null;
}

function TimerFigure({ timer }: { timer: Timer }) {
  const text = useLive(({ nowMs }) => formatDuration(secondsLeft(timer, nowMs)));
  return <span data-long={text.length > 5 || undefined}>{text}</span>;
}

function CrossingCountdown() {
  const state = useRunState();
  const actStepId = useLive(({ view }) => view?.target?.actStepId ?? null);
  const kind = useLive(({ view }) => view?.forecast?.kind ?? null);
  const figure = useLive(({ view, nowMs }) => {
    const forecast = view?.forecast;
    return forecast?.kind === 'forecast' ? aboutText((forecast.atMs - nowMs) / 1000) : null;
  });
  const spread = useLive(({ view, nowMs }) => {
    const forecast = view?.forecast;
    if (forecast?.kind !== 'forecast' || forecast.lateMs - forecast.earlyMs < 10_000) return null;
    const part = (atMs: number) => aboutText((atMs - nowMs) / 1000).replace('about ', '');
    return `between ${part(forecast.earlyMs)} and ${part(forecast.lateMs)}`;
  });
  const isTooLate = useLive(({ view }) => view?.estimate.status === 'stale' || view?.estimate.status === 'lost');
  const current = currentStep(state);
  const act = state.steps.find(({ step }) => step.id === actStepId)?.step;
  const what = act && act.id !== current?.step.id ? `${act.title} comes up in` : 'comes up in';
  if (isTooLate) {
    return (
      <div className="countdown">
        <p className="countdown-label">No reading comes in, so nothing is forecast. Watch a thermometer by hand.</p>
      </div>
    );
  }
  if (figure === null) {
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
        <span data-long={figure.length > 5 || undefined}>{figure}</span>
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
