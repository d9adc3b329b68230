import { useState, type ReactNode } from 'react';
import {
  alertPriority,
  alertWords,
  burstsOf,
  freshChoice,
  HOLD_TIMER,
  isFault,
  missedCatch,
  openFaults,
  type Alert,
  type MissedChoiceMade,
} from '@steepfall/shared/runs';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { stationName } from '#lib/ids.ts';
import { useLive, useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { callingHere, takeOverAlert } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { alertLevel, dueAtMs, dueText } from './alert-level.ts';
import { FaultList } from './fault-list.tsx';
import { faultCount, faultWords, quietText } from './fault-words.ts';
import { liquidC, type Missed } from './missed-catch.ts';
import { MissedChoices } from './missed-take-over.tsx';
import { chosenWords } from './missed-words.ts';
import { SoundStrip } from './sound-strip.tsx';
import { useSoundOff } from './use-sound-off.ts';
import './alerts.css';

const stageWords = { 'coming-up': 'Coming up', 'stand-by': 'Stand by', now: 'Now', missed: 'Late' } as const;

/** One calm line, at the place kept for it: what is on its way, what does not work, what was chosen, or a sound that is off. */
export function AlertStrips() {
  const state = useRunState();
  const [isListOpen, setListOpen] = useState(false);
  const faults = openFaults(state, stationName());
  return (
    <>
      <OneStrip faults={faults} onFaults={() => setListOpen(true)} />
      <FaultList faults={faults} isOpen={isListOpen} onClose={() => setListOpen(false)} />
    </>
  );
}

interface FaultsProps {
  faults: readonly Alert[];
  onFaults: () => void;
}

function OneStrip({ faults, onFaults }: FaultsProps) {
  const state = useRunState();
  if (takeOverAlert(state)) return null;
  const calling = callingHere(state);
  const coming = calling.find((alert) => !isFault(alert));
  const badge = <FaultBadge faults={faults} onFaults={onFaults} />;
  if (coming) return <Strip alert={coming} badge={badge} />;
  const [burst] = burstsOf(calling.filter(isFault));
  if (burst) return <FaultStrip alert={burst.first} restCount={burst.rest.length} onFaults={onFaults} />;
  const choice = freshChoice(state);
  if (choice) return <ChosenStrip choice={choice} badge={badge} />;
  const missed = missedCatch(state);
  if (missed) return <LateStrip missed={missed} badge={badge} />;
  return (
    <>
      <SoundStrip />
      {faults.length > 0 ? <QuietFaults faults={faults} onFaults={onFaults} /> : null}
    </>
  );
}

function Strip({ alert, badge }: { alert: Alert; badge: ReactNode }) {
  const units = useUnits();
  const state = useRunState();
  const store = useRunStore();
  const due = useLive((live) => dueText(dueAtMs(alert, live), live.nowMs));
  const { verb } = alertWords(state, alert);
  const number = alertLevel(alert, units);
  const { key, crossing, stage } = alert;
  const isSoundOff = useSoundOff();
  const acknowledge = () => {
    if (isSoundOff) void alarmSounds.unlock();
    void store.act({ type: 'acknowledgeAlert', key, crossing });
  };
  return (
    <div className="strip" data-stage={stage}>
      <ShapeGlyph shape="diamond" className="size-7 shrink-0" />
      <p className="strip-text">
        <strong>{stageWords[stage]}:</strong> {verb}
        {number ? ` at ${number}` : ''}
        {due ? <span className="tabular-nums">, {due}</span> : null}
        {isSoundOff ? <strong> · Sound is off</strong> : null}
      </p>
      <span className="sr-only" role="status">
        {stageWords[stage]}: {verb}
      </span>
      {badge}
      <PressButton className="strip-act" onPress={acknowledge}>
        Heard it
      </PressButton>
    </div>
  );
}

/** Of what does not work: the first of a burst stays on top, with the number of those that fold under it. */
function FaultStrip({ alert, restCount, onFaults }: { alert: Alert; restCount: number; onFaults: () => void }) {
  const state = useRunState();
  const store = useRunStore();
  const { verb, why, sentence } = alertWords(state, alert);
  const { key, crossing } = alert;
  const word = faultWords[alertPriority(alert)];
  return (
    <div className="strip" data-kind="fault" data-priority={alertPriority(alert)}>
      <ShapeGlyph shape="broken" className="size-7 shrink-0" />
      <p className="strip-text">
        <strong>{word}:</strong> {verb}
        {restCount > 0 ? <strong> and {restCount} more</strong> : null}
        <span className="strip-why"> {why}</span>
      </p>
      <span className="sr-only" role="status">
        {word}: {sentence}
      </span>
      <PressButton className="strip-act" onPress={() => void store.act({ type: 'acknowledgeAlert', key, crossing })}>
        Heard it
      </PressButton>
      <PressButton className="strip-act strip-more" onPress={onFaults}>
        More
      </PressButton>
    </div>
  );
}

/** Heard or put aside, and still true: without a sound, never without a word. */
function QuietFaults({ faults, onFaults }: FaultsProps) {
  const state = useRunState();
  const text = useLive(({ nowMs }) => quietText(faults, state, nowMs));
  return (
    <PressButton className="strip strip-button" onPress={onFaults}>
      <ShapeGlyph shape="broken" className="size-7 shrink-0" />
      <span className="strip-text strip-quiet">{text}</span>
    </PressButton>
  );
}

function FaultBadge({ faults, onFaults }: FaultsProps) {
  const count = useLive(({ nowMs }) => faultCount(faults, nowMs));
  if (faults.length === 0) return null;
  return (
    <PressButton className="strip-act strip-badge" onPress={onFaults} label={count}>
      <ShapeGlyph shape="broken" className="size-6 shrink-0" />
      {faults.length}
    </PressButton>
  );
}

/** What was chosen about a missed catch, and the way back from it. */
function ChosenStrip({ choice, badge }: { choice: MissedChoiceMade; badge: ReactNode }) {
  const state = useRunState();
  const store = useRunStore();
  const units = useUnits();
  const hold = state.timers.find(({ label, startedAtMs }) => label === HOLD_TIMER && startedAtMs === choice.atMs);
  const leftS = useLive(({ nowMs }) => (hold ? Math.max(0, Math.ceil((hold.endsAtMs - nowMs) / 1000)) : null));
  const progress = state.steps.find(({ step }) => step.id === choice.stepId);
  const alert = state.alerts.find(({ key, crossing }) => key === choice.key && crossing === choice.crossing);
  if (!progress) return null;
  const text = chosenWords(choice, { step: progress.step, targetC: alert?.targetC ?? 0, leftS }, units);
  const takeBack = () =>
    void store.act(
      choice.choice === 'reheat'
        ? { type: 'undoEvent', eventId: choice.eventId, eventType: 'choice.made' }
        : { type: 'goBack' },
    );
  return (
    <div className="strip" data-length={text.length > 60 ? 'long' : undefined}>
      <ShapeGlyph shape={choice.choice === 'reheat' ? 'up' : 'flat'} className="size-7 shrink-0" />
      <p className="strip-text tabular-nums">{text}</p>
      {badge}
      <PressButton className="strip-act" onPress={takeBack}>
        Take back
      </PressButton>
    </div>
  );
}

/** Heard, and still not in: the ways out stay one press away. */
function LateStrip({ missed, badge }: { missed: Missed; badge: ReactNode }) {
  const store = useRunStore();
  const [isOpen, setOpen] = useState(false);
  const { title } = missed.progress.step;
  return (
    <div className="strip">
      <ShapeGlyph shape="diamond" className="size-7 shrink-0" />
      <p className="strip-text">
        <strong>Late:</strong> {title}
      </p>
      {badge}
      <PressButton className="strip-act" onPress={() => setOpen(true)}>
        What now?
      </PressButton>
      <Dialog
        isOpen={isOpen}
        onClose={() => setOpen(false)}
        title={`${title}: late`}
        size="wide"
        actions={
          <Button size="sheet" onClick={() => setOpen(false)}>
            Close
          </Button>
        }
      >
        <MissedChoices
          missed={missed}
          onAct={(command) => {
            setOpen(false);
            void store.act(command);
          }}
          onComplete={(stepIds) => {
            const nowC = liquidC(store.live.get());
            const tempC = nowC === null ? null : Math.round(nowC * 100) / 100;
            for (const stepId of stepIds) void store.act({ type: 'completeStep', stepId, tempC });
          }}
        />
      </Dialog>
    </div>
  );
}
