import { currentStep, upcomingSteps, type RunCommand } from '@steepfall/shared/runs';
import { secondsLeft, type Timer } from '@steepfall/shared/timers';
import { formatDuration } from '@steepfall/shared/units';
import { PressButton } from '#components/press-button.tsx';
import { useLive, useRunState } from '#lib/run-store/run-context.tsx';
import { conditionText } from './sheet-words.ts';
import { leadingTimer } from './countdown.tsx';

/** What can be done meanwhile, what comes next, and the way to the whole sheet. */
export function Foot({ onAct, onAllSteps }: { onAct: (command: RunCommand) => void; onAllSteps: () => void }) {
  const state = useRunState();
  const current = currentStep(state);
  const next = upcomingSteps(state, 2);
  const tasks = current?.step.meanwhile ?? [];
  const leading = leadingTimer(state);
  const timers = state.timers.filter(({ id, stepId }) => stepId === null && id !== leading?.id);
  const isLeadingOwn = leading !== null && leading.stepId === null;
  return (
    <footer className="foot">
      {tasks.length > 0 && current ? (
        <div className="foot-tasks" role="group" aria-label="Meanwhile">
          <span className="foot-label">meanwhile</span>
          {tasks.map(({ id, text }) => {
            const isTicked = current.tickedTaskIds.includes(id);
            return (
              <button
                key={id}
                type="button"
                role="checkbox"
                aria-checked={isTicked}
                disabled={isTicked}
                className="foot-task"
                onClick={() => onAct({ type: 'tickTask', stepId: current.step.id, taskId: id })}
              >
                <TickBox isTicked={isTicked} />
                {text}
              </button>
            );
          })}
        </div>
      ) : null}
      {[...(isLeadingOwn && leading ? [leading] : []), ...timers].map((timer) => (
        <OwnTimer key={timer.id} timer={timer} onStop={() => onAct({ type: 'stopTimer', timerId: timer.id })} />
      ))}
      <PressButton
        className="foot-next"
        onPress={onAllSteps}
        label={`All steps. Next: ${next.map(({ step }) => step.title).join(', ') || 'the end'}`}
      >
        <span className="foot-label">next</span>
        <span className="foot-next-steps">
          {next.length === 0 ? <span>the end</span> : null}
          {next.map(({ step }) => (
            <span key={step.id}>
              {step.title} <span className="text-soft">{conditionText(step)}</span>
            </span>
          ))}
        </span>
        <span className="foot-all">All steps</span>
      </PressButton>
    </footer>
  );
}

function OwnTimer({ timer, onStop }: { timer: Timer; onStop: () => void }) {
  const left = useLive(({ nowMs }) => formatDuration(secondsLeft(timer, nowMs)));
  return (
    <PressButton className="foot-timer" onPress={onStop} label={`Stop the timer ${timer.label}, ${left} left`}>
      <span>{timer.label}</span>
      <span className="tabular-nums font-semibold">{left}</span>
      <span className="foot-all">Stop</span>
    </PressButton>
  );
}

function TickBox({ isTicked }: { isTicked: boolean }) {
  return (
    <svg
      viewBox="0 0 24 24"
      aria-hidden="true"
      className="size-7 shrink-0"
      fill="none"
      stroke="currentColor"
      strokeWidth="2.500"
    >
      <path d="M3 3h18v18H3z" />
      {isTicked ? <path d="M7 12l4 4 7-9" strokeWidth="3" /> : null}
    </svg>
  );
}
