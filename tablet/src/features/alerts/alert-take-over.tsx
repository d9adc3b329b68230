import { useEffect, useRef } from 'react';
import {
  alertWords,
  currentStep,
  standingAlerts,
  type Alert,
  type RunCommand,
  type RunState,
  type StepProgress,
} from '@steepfall/shared/runs';
import { formatMass } from '@steepfall/shared/units';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useLive, useRun, useRunState } from '#lib/run-store/run-context.tsx';
import { alertStageId, heardCommands, takeOverAlert } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { alertLevel, dueAtMs, dueText } from './alert-level.ts';
import { useSoundOff } from './use-sound-off.ts';

interface AlertTakeOverProps {
  /** Marks steps done in this order, with the temperature of this instant. */
  onComplete: (stepIds: string[]) => void;
  onAct: (command: RunCommand) => void;
  /** Why the last act was refused, for a moment after it. */
  refusal: string | null;
}

/** Act now: the verb, the amount, the bag, the number. The live temperature stays above it. */
export function AlertTakeOver(props: AlertTakeOverProps) {
  const state = useRunState();
  const alert = takeOverAlert(state);
  if (!alert) return null;
  return <TakeOver key={alertStageId(alert)} alert={alert} {...props} />;
}

/** The steps from the current one to this one; empty when it is not ahead. */
function stepsUpTo(state: RunState, stepId: string | null): StepProgress[] {
  const open = state.steps.filter(({ status }) => status !== 'done');
  return open.slice(0, open.findIndex(({ step }) => step.id === stepId) + 1);
}

function TakeOver({ alert, onComplete, onAct, refusal }: AlertTakeOverProps & { alert: Alert }) {
  const { state, isJoined } = useRun();
  const units = useUnits();
  const heading = useRef<HTMLHeadingElement>(null);
  const due = useLive((live) => dueText(dueAtMs(alert, live), live.nowMs));
  const { verb, amounts, sentence } = alertWords(state, alert, units.temperature);
  const number = alertLevel(alert, units);
  const current = currentStep(state);
  const path = stepsUpTo(state, alert.actStepId);
  const forgotten = path.slice(0, -1).find(({ step }) => step.done.by === 'hand' || step.done.by === 'measurement');
  // What goes on by itself is done with the act: one tap, with the hands full.
  const toComplete = forgotten ? [forgotten] : path.length > 0 ? path : current ? [current] : [];
  const isAct = path.length > 0 && !forgotten;
  const others = standingAlerts(state).filter((other) => alertStageId(other) !== alertStageId(alert));
  const isSoundOff = useSoundOff();
  const isOwnTimer = alert.rule === 'timer' && alert.stepId === null;

  useEffect(() => {
    if (!document.querySelector('[role="dialog"]')) heading.current?.focus({ preventScroll: true });
  }, []);

  const acknowledge = () => {
    if (isSoundOff) void alarmSounds.unlock();
    for (const command of heardCommands(alert)) onAct(command);
  };

  return (
    <>
      <div className="slot">
        <p className="take-over-stage">
          <span className="take-over-mark">
            <ShapeGlyph shape="diamond" className="size-full" />
          </span>
          {alert.stage === 'missed' ? 'Late' : 'Now'}
          {due ? <span className="tabular-nums"> · {due}</span> : null}
        </p>
        {refusal ? (
          <p role="alert" className="take-over-aside">
            {refusal}
          </p>
        ) : null}
        <p className="take-over-aside" hidden={refusal !== null}>
          {[
            isSoundOff ? 'sound is off' : null,
            forgotten ? `not ticked yet: ${forgotten.step.title}` : null,
            others.length > 0 ? `also: ${others.map((other) => alertWords(state, other).verb).join(', ')}` : null,
          ]
            .filter(Boolean)
            .join(' · ')}
        </p>
      </div>
      <section className="take-over" aria-label="Alert">
        <p role="alert" className="sr-only">
          {sentence}{' '}
          {amounts
            .map(({ name, massG, bag }) => `${formatMass(massG, { unit: units.mass })} ${name}${bag ? `, ${bag}` : ''}`)
            .join('. ')}
        </p>
        <div className="take-over-line">
          <h1 ref={heading} tabIndex={-1} id="step-heading" className="take-over-verb">
            {verb}
          </h1>
          {number ? <p className="take-over-number">{number}</p> : null}
        </div>
        {amounts.length > 0 ? (
          <ul className="take-over-amounts" data-many={amounts.length > 2 || undefined}>
            {amounts.map(({ name, massG, bag }) => (
              <li key={name}>
                {formatMass(massG, { unit: units.mass })} {name}
                {bag ? <span className="step-bag">{bag}</span> : null}
              </li>
            ))}
          </ul>
        ) : null}
        {alert.rule === 'signal' ? (
          <p className="step-detail">
            {isJoined
              ? 'No reading comes in. Look at the probe and its cable, and watch a thermometer by hand.'
              : 'The hub is away, so no reading comes in. Watch a thermometer by hand until it is back.'}
          </p>
        ) : null}
      </section>
      <section className="act-bar" aria-label="Act">
        <PressButton
          className="act-side act-back"
          onPress={() => onAct({ type: 'goBack' })}
          isDisabled={state.doneOrder.length === 0}
        >
          Back one
        </PressButton>
        <div className="act-pair">
          <PressButton
            className={isAct ? 'act-main act-quiet' : 'act-main'}
            onPress={acknowledge}
            note="stops the sound"
          >
            {isOwnTimer ? 'Stop the timer' : 'Heard it'}
          </PressButton>
          {toComplete.length > 0 && !isOwnTimer ? (
            <PressButton
              className={isAct ? 'act-main' : 'act-main act-quiet'}
              onPress={() => onComplete(toComplete.map(({ step }) => step.id))}
              note={toComplete.at(-1)?.step.title}
            >
              Done
            </PressButton>
          ) : null}
        </div>
      </section>
    </>
  );
}
