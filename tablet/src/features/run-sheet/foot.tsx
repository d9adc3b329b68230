import { currentStep, upcomingSteps, type RunCommand } from '@steepfall/shared/runs';
import { PressButton } from '#components/press-button.tsx';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { conditionText } from './sheet-words.ts';
import { WipeButton } from './wipe-lock.tsx';

interface FootProps {
  onAct: (command: RunCommand) => void;
  onTimer: () => void;
  onAllSteps: () => void;
  /** Held long enough: the glass can be wiped now. */
  onWipe: () => void;
}

/** What can be done meanwhile, what comes next, and the way to the whole sheet. */
export function Foot({ onAct, onTimer, onAllSteps, onWipe }: FootProps) {
  const units = useUnits();
  const state = useRunState();
  const current = currentStep(state);
  const next = upcomingSteps(state, 2);
  const tasks = current?.step.meanwhile ?? [];
  const isRunning = state.status === 'running';
  return (
    <footer className="foot">
      {tasks.length > 0 && current ? (
        <div className="foot-tasks" role="group" aria-label="Meanwhile">
          <span className="foot-label">meanwhile</span>
          {tasks.map(({ id, text }) => {
            const isTicked = current.tickedTaskIds.includes(id);
            return (
              <PressButton
                key={id}
                isChecked={isTicked}
                isDisabled={isTicked}
                className="foot-task"
                onPress={() => onAct({ type: 'tickTask', stepId: current.step.id, taskId: id })}
              >
                <TickBox isTicked={isTicked} />
                {text}
              </PressButton>
            );
          })}
        </div>
      ) : null}
      <PressButton className="foot-next" onPress={onAllSteps}>
        {isRunning ? (
          <>
            <span className="foot-label">next</span>
            <span className="foot-next-steps">
              {next.length === 0 ? <span>the end</span> : null}
              {next.map(({ step }) => (
                <span key={step.id}>
                  {step.title} <span className="text-soft">{conditionText(step, units)}</span>
                </span>
              ))}
            </span>
          </>
        ) : null}
        <span className="foot-all">All steps</span>
      </PressButton>
      {isRunning ? (
        <>
          <PressButton className="foot-button" onPress={onTimer}>
            <span className="foot-all">Timer</span>
          </PressButton>
          <WipeButton onHeld={onWipe} />
        </>
      ) : null}
    </footer>
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
