import { useEffect, useRef } from 'react';
import { alertWords, currentStep, standingAlerts, type Alert } from '@steepfall/shared/runs';
import { formatMass } from '@steepfall/shared/units';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useLive, useRun, useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { alertStageId, takeOverAlert } from '#lib/run-store/take-over.ts';
import { alertLevel, dueAtMs, dueText } from './alert-level.ts';

interface AlertTakeOverProps {
  /** Marks a step done, with the temperature of this instant. */
  onComplete: (stepId: string) => void;
}

/** Act now: the verb, the amount, the bag, the number. The live temperature stays above it. */
export function AlertTakeOver({ onComplete }: AlertTakeOverProps) {
  const state = useRunState();
  const alert = takeOverAlert(state);
  if (!alert) return null;
  return <TakeOver key={alertStageId(alert)} alert={alert} onComplete={onComplete} />;
}

function TakeOver({ alert, onComplete }: AlertTakeOverProps & { alert: Alert }) {
  const { state, isJoined } = useRun();
  const store = useRunStore();
  const heading = useRef<HTMLHeadingElement>(null);
  const due = useLive((live) => dueText(dueAtMs(alert, live), live.nowMs));
  const { verb, amounts, sentence } = alertWords(state, alert);
  const number = alertLevel(alert);
  const current = currentStep(state);
  const act = state.steps.find(({ step }) => step.id === alert.actStepId);
  const isActCurrent = current !== null && act?.step.id === current.step.id;
  const others = standingAlerts(state).filter((other) => alertStageId(other) !== alertStageId(alert));
  const isOwnTimer = alert.rule === 'timer' && alert.stepId === null;

  useEffect(() => {
    if (!document.querySelector('[role="dialog"]')) heading.current?.focus({ preventScroll: true });
  }, []);

  const acknowledge = () => {
    const { key, crossing } = alert;
    void store.act({ type: 'acknowledgeAlert', key, crossing });
    if (isOwnTimer) void store.act({ type: 'stopTimer', timerId: key.replace('timer:', '') });
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
      </div>
      <section className="take-over" aria-label="Alert">
        <p role="alert" className="sr-only">
          {sentence}{' '}
          {amounts
            .map(({ name, massG, bag }) => `${formatMass(massG, { unit: 'g' })} ${name}${bag ? `, ${bag}` : ''}`)
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
                {formatMass(massG, { unit: 'g' })} {name}
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
        {act && !isActCurrent && current ? <p className="step-detail">Not ticked yet: {current.step.title}.</p> : null}
        {others.length > 0 ? (
          <p className="step-detail">Also: {others.map((other) => alertWords(state, other).verb).join(', ')}.</p>
        ) : null}
      </section>
      <section className="act-bar" aria-label="Act">
        <PressButton
          className="act-side act-back"
          onPress={() => void store.act({ type: 'goBack' })}
          isDisabled={state.doneOrder.length === 0}
        >
          Back one
        </PressButton>
        <div className="act-pair">
          <PressButton
            className={isActCurrent ? 'act-main act-quiet' : 'act-main'}
            onPress={acknowledge}
            note="stops the sound"
          >
            {isOwnTimer ? 'Stop the timer' : 'Heard it'}
          </PressButton>
          {current && !isOwnTimer ? (
            <PressButton
              className={isActCurrent ? 'act-main' : 'act-main act-quiet'}
              onPress={() => onComplete(current.step.id)}
              note={current.step.title}
            >
              Done
            </PressButton>
          ) : null}
        </div>
      </section>
    </>
  );
}
