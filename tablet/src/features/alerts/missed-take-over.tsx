import { useEffect, useRef } from 'react';
import { type MissedChoice, type RunCommand } from '@steepfall/shared/runs';
import { PressButton } from '#components/press-button.tsx';
import { useLive, useRun } from '#lib/run-store/run-context.tsx';
import { takeOverPress } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { choicesNow, stepsUpTo, type Missed } from './missed-catch.ts';
import { choiceWords } from './missed-words.ts';

/** A pedal that was on its way for "heard it" when the moment turned to "late" must not choose anything. */
const PEDAL_PATIENCE_MS = 1_500;

interface MissedChoicesProps {
  missed: Missed;
  onAct: (command: RunCommand) => void;
  /** Marks steps done in this order, with the temperature of this instant. */
  onComplete: (stepIds: string[]) => void;
  /** The pedal and the wave take the first one. */
  isOnPedal?: boolean;
}

/** The ways out of a missed catch, as large as "done": each is one press, and can be taken back. */
export function MissedChoices({ missed, onAct, onComplete, isOnPedal = false }: MissedChoicesProps) {
  const snapshot = useRun();
  const units = useUnits();
  const { alert, progress } = missed;
  const { step } = progress;
  const seen = useLive((live) => JSON.stringify(choicesNow(missed, snapshot, live)));
  const { nowC, choices } = JSON.parse(seen) as ReturnType<typeof choicesNow>;

  const choose = ({ choice, holdS, extraG, reheatS }: MissedChoice) => {
    const { key, crossing } = alert;
    onAct({ type: 'chooseForMissed', key, crossing, stepId: step.id, choice, holdS, extraG, reheatS });
    // What goes in goes in with the same press; what is heated up again goes in later.
    if (choice !== 'reheat') onComplete(stepsUpTo(snapshot.state, step.id).map((one) => one.step.id));
  };

  const takeFirst = useRef<() => void>(() => undefined);
  useEffect(() => {
    takeFirst.current = () => {
      if (choices[0]) choose(choices[0]);
    };
  });
  useEffect(() => {
    if (!isOnPedal) return undefined;
    const timer = setTimeout(() => takeOverPress.set(() => takeFirst.current()), PEDAL_PATIENCE_MS);
    return () => {
      clearTimeout(timer);
      takeOverPress.set(null);
    };
  }, [isOnPedal]);

  return (
    <div className="missed-choices" role="group" aria-label="What to do about it">
      {choices.map((choice, index) => {
        const { title, first, effect } = choiceWords(choice, { step, targetC: alert.targetC ?? 0, nowC }, units);
        return (
          <PressButton
            key={choice.choice}
            className={index === 0 ? 'act-main missed-choice' : 'act-main act-quiet missed-choice'}
            onPress={() => choose(choice)}
            note={first ? `${first} · ${effect}` : effect}
          >
            {title}
          </PressButton>
        );
      })}
    </div>
  );
}
