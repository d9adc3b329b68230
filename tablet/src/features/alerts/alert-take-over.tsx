import { useEffect, useRef } from 'react';
import {
  alertPriority,
  alertWords,
  currentStep,
  HOLD_TIMER,
  isFault,
  missedCatch,
  QUIET_REASON,
  QUIET_S,
  type Alert,
  type RunCommand,
} from '@steepfall/shared/runs';
import { formatMass } from '@steepfall/shared/units';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useLive, useRun, useRunState } from '#lib/run-store/run-context.tsx';
import { alertStageId, callingHere, heardCommands, takeOverAlert } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { alertLevel, dueAtMs, dueText } from './alert-level.ts';
import { faultWords } from './fault-words.ts';
import { stepsUpTo } from './missed-catch.ts';
import { MissedChoices } from './missed-take-over.tsx';
import { useSoundOff } from './use-sound-off.ts';
import './alerts.css';

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

function TakeOver({ alert, onComplete, onAct, refusal }: AlertTakeOverProps & { alert: Alert }) {
  const { state } = useRun();
  const units = useUnits();
  const heading = useRef<HTMLHeadingElement>(null);
  const due = useLive((live) => dueText(dueAtMs(alert, live), live.nowMs));
  const { verb, amounts, why, sentence } = alertWords(state, alert, units.temperature);
  const number = alertLevel(alert, units);
  const current = currentStep(state);
  const path = stepsUpTo(state, alert.actStepId);
  const missed = missedCatch(state);
  const toMakeUpFor = alert.stage === 'missed' && missed?.progress.step.id === alert.actStepId ? missed : null;
  const waiting = path.slice(0, -1).filter(({ step }) => step.done.by === 'hand' || step.done.by === 'measurement');
  // What can be made up for is not held up by what was not ticked: it is ticked with it.
  const forgotten = toMakeUpFor ? undefined : waiting[0];
  // What goes on by itself is done with the act: one tap, with the hands full.
  const toComplete = forgotten ? [forgotten] : path.length > 0 ? path : current ? [current] : [];
  const isAct = path.length > 0 && !forgotten;
  const others = callingHere(state).filter(
    (other) => alertStageId(other) !== alertStageId(alert) && other.actStepId !== (alert.actStepId ?? undefined),
  );
  const isSoundOff = useSoundOff();
  const isOwnTimer = alert.rule === 'timer' && alert.stepId === null;
  const isHold =
    isOwnTimer && state.timers.some(({ id, label }) => alert.key === `timer:${id}` && label === HOLD_TIMER);
  const isOfKit = isFault(alert);

  useEffect(() => {
    if (!document.querySelector('[role="dialog"]')) heading.current?.focus({ preventScroll: true });
  }, []);

  const acknowledge = () => {
    if (isSoundOff) void alarmSounds.unlock();
    for (const command of heardCommands(alert)) onAct(command);
  };
  const quiet = () => {
    const { key, crossing } = alert;
    onAct({ type: 'shelveAlert', key, crossing, forS: QUIET_S, reason: QUIET_REASON });
  };
  const tickedWith = waiting.map(({ step }) => step.title).join(', ');

  return (
    <>
      <div className="slot">
        <p className="take-over-stage">
          <span className="take-over-mark">
            <ShapeGlyph shape={isOfKit ? 'broken' : 'diamond'} className="size-full" />
          </span>
          {isOfKit ? faultWords[alertPriority(alert)] : alert.stage === 'missed' ? 'Late' : 'Now'}
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
            tickedWith ? `${toMakeUpFor ? 'ticked with it' : 'not ticked yet'}: ${tickedWith}` : null,
            others.length > 0
              ? `${isOfKit ? `and ${others.length} more` : 'also'}: ${others.map((other) => alertWords(state, other).verb).join(', ')}`
              : null,
          ]
            .filter(Boolean)
            .join(' · ')}
        </p>
      </div>
      <section
        className="take-over"
        aria-label={isOfKit ? 'Fault' : 'Alert'}
        data-kind={isOfKit ? 'fault' : toMakeUpFor ? 'missed' : undefined}
      >
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
          {number ? <p className="take-over-number">{toMakeUpFor ? `was for ${number}` : number}</p> : null}
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
        {why ? <p className="step-detail">{why}</p> : null}
      </section>
      <section className="act-bar" aria-label="Act" data-kind={toMakeUpFor ? 'missed' : undefined}>
        <div className="act-beside">
          <PressButton
            className="act-side act-back"
            onPress={() => onAct({ type: 'goBack' })}
            isDisabled={state.doneOrder.length === 0}
          >
            Back one
          </PressButton>
          {toMakeUpFor ? (
            <PressButton className="act-side" onPress={acknowledge} note="stops the sound">
              Heard it
            </PressButton>
          ) : null}
          {isOfKit ? (
            <PressButton className="act-side" onPress={quiet}>
              Quiet for 2 min
            </PressButton>
          ) : null}
        </div>
        {toMakeUpFor ? (
          <MissedChoices missed={toMakeUpFor} onAct={onAct} onComplete={onComplete} isOnPedal />
        ) : (
          <div className="act-pair">
            <PressButton
              className={isAct ? 'act-main act-quiet' : 'act-main'}
              onPress={acknowledge}
              note="stops the sound"
            >
              {isHold ? 'It is on' : isOwnTimer ? 'Stop the timer' : 'Heard it'}
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
        )}
      </section>
    </>
  );
}
