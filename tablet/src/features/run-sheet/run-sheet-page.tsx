import { useCallback, useEffect, useState, type ComponentType, type ReactNode } from 'react';
import { Link, useParams } from 'react-router-dom';
import { currentStep, stepPosition, type Decision, type RunCommand, type RunState } from '@steepfall/shared/runs';
import type { MeasuredQuantity } from '@steepfall/shared/sheets';
import { useTabTitle } from '#components/page.tsx';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { stationName } from '#lib/ids.ts';
import { usePedal } from '#lib/press/use-pedal.ts';
import { useVoice } from '#lib/voice/use-voice.ts';
import { answerTo } from '#lib/voice/intents.ts';
import { useWave } from '#lib/wave/use-wave.ts';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { RunProvider, useOpenRun, useRun, useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import type { RunSnapshot, RunStore } from '#lib/run-store/run-store.ts';
import { takeOverAlert, takeOverPress } from '#lib/run-store/take-over.ts';
import { useUnits } from '#lib/units.ts';
import { useStored } from '#lib/value-store.ts';
import { holdRunLock } from '#lib/wake-lock/run-lock.ts';
import { keepAwake } from '#lib/wake-lock/wake-lock.ts';
import { ActBar, type ExtraSheet } from './act-bar.tsx';
import { AllSteps } from './all-steps.tsx';
import { LastDone } from './countdown.tsx';
import { Ended } from './ended.tsx';
import { FallLine } from './fall-line.tsx';
import { Foot } from './foot.tsx';
import { LiveTemperature } from './live-temperature.tsx';
import { MeasureSheet } from './measure-sheet.tsx';
import { NoteSheet } from './note-sheet.tsx';
import { pedalNext } from './primary-act.ts';
import { SheetDialog } from './sheet-dialog.tsx';
import { conditionText, conflictText } from './sheet-words.ts';
import { StatusLine } from './status-line.tsx';
import { StepArea } from './step-area.tsx';
import { TimerSheet } from './timer-sheet.tsx';
import { WipeLock } from './wipe-lock.tsx';
import './run-sheet.css';

/** What other features put on the sheet. A route joins them, since features do not know each other. */
export interface RunSheetPageProps {
  /** Over the sheet, when the run is a rehearsal. */
  rehearsal: ReactNode;
  /** Instead of step and act, until sound was checked on this station. */
  soundCheck: ReactNode;
  /** Warnings that leave the step in place. */
  strips: ReactNode;
  /** Instead of step and act, while an alert says "now". */
  TakeOver: ComponentType<{
    onComplete: (stepIds: string[]) => void;
    onAct: (command: RunCommand) => void;
    refusal: string | null;
  }>;
  /** Draws nothing. */
  ringer: ReactNode;
}

export function RunSheetPage(props: RunSheetPageProps) {
  const { runId = '' } = useParams();
  const store = useOpenRun(runId);
  // Reading this tablet's own copy takes a few milliseconds: no spinner for that.
  if (!store) return <div className="sheet-blank" aria-busy="true" />;
  return (
    <RunProvider store={store}>
      <Phase {...props} />
    </RunProvider>
  );
}

function Phase(props: RunSheetPageProps) {
  const store = useRunStore();
  const { phase, problem } = useStored(store.snapshot);
  if (phase === 'open') return <Sheet {...props} />;
  if (phase === 'missing') {
    return (
      <Nothing title="No such run">
        {problem?.status === 403
          ? 'Your role does not show runs. Ask the owner of the house.'
          : 'It is not in this house. Look among the runs that are open.'}
      </Nothing>
    );
  }
  return (
    <Nothing title="Looking for the run">
      This tablet has not opened it before, so it waits for the hub. It appears by itself.
    </Nothing>
  );
}

function Nothing({ title, children }: { title: string; children: ReactNode }) {
  useTabTitle(title);
  return (
    <main className="mx-auto grid max-w-prose gap-5 px-6 py-16">
      <h1 className="text-title">{title}</h1>
      <p className="text-lead text-soft">{children}</p>
      <Link
        to="/"
        className="inline-flex min-h-18 items-center justify-self-start rounded-xl border-2 border-edge px-7 text-lead font-medium"
      >
        Go home
      </Link>
    </main>
  );
}

/** The liquid at this instant in hundredths of a degree; `null` when nobody knows. */
function liquidNow(store: RunStore): number | null {
  const { view } = store.live.get();
  if (view?.estimate.status !== 'live' || view.estimate.tempC === null) return null;
  return Math.round(view.estimate.tempC * 100) / 100;
}

function hasCheckedSound({ entries }: RunSnapshot): boolean {
  const station = stationName();
  return entries.some((entry) => entry.type === 'sound.checked' && entry.station === station);
}

type OpenSheet = { kind: ExtraSheet } | { kind: 'measure'; quantity: MeasuredQuantity } | { kind: 'steps' } | null;

function Sheet({ rehearsal, soundCheck, strips, TakeOver, ringer }: RunSheetPageProps) {
  const store = useRunStore();
  const snapshot = useRun();
  const { state } = snapshot;
  const [sheet, setSheet] = useState<OpenSheet>(null);
  const [isWiping, setIsWiping] = useState(false);
  const [refusal, setRefusal] = useState<string | null>(null);
  const { temperature } = useUnits();
  const alert = takeOverAlert(state);
  const isRunning = state.status === 'running';
  const mustCheckSound = isRunning && !hasCheckedSound(snapshot);
  const current = currentStep(state);
  useTabTitle(current ? `${current.step.title} · ${state.title}` : state.title);

  useEffect(() => {
    if (!isRunning) return undefined;
    const letSleep = keepAwake();
    const letUpdate = holdRunLock();
    return () => {
      letSleep();
      letUpdate();
    };
  }, [isRunning]);

  const record = useCallback((command: RunCommand): Promise<Decision> => store.act(command), [store]);
  const act = useCallback(
    (command: RunCommand) => {
      void store.act(command).then((decision) => {
        setRefusal(decision.ok ? null : decision.problem.detail);
      });
    },
    [store],
  );
  const stopWiping = useCallback(() => setIsWiping(false), []);
  const complete = useCallback(
    (stepId: string) => {
      act({ type: 'completeStep', stepId, tempC: liquidNow(store) });
    },
    [act, store],
  );

  useEffect(() => {
    if (!refusal) return undefined;
    const timer = setTimeout(() => setRefusal(null), 6_000);
    return () => clearTimeout(timer);
  }, [refusal]);

  const goOn = () => {
    if (mustCheckSound && !alert) return undefined;
    const next = pedalNext(store.snapshot.get().state);
    switch (next.kind) {
      case 'acknowledge':
        if (takeOverPress.get()) return takeOverPress.get()?.();
        return act({ type: 'acknowledgeAlert', key: next.key, crossing: next.crossing });
      case 'complete':
        return complete(next.progress.step.id);
      case 'measure':
        return setSheet({ kind: 'measure', quantity: next.quantity });
      case 'finish':
      case 'none':
        return undefined;
    }
  };
  usePedal(
    (pedal) => (pedal === 'back' ? act({ type: 'goBack' }) : goOn()),
    () => takeOverAlert(store.snapshot.get().state) !== null,
  );
  useWave(() => {
    if (sheet === null) goOn();
  }, isRunning);
  useVoice((intent) => {
    if (mustCheckSound) return;
    const { view } = store.live.get();
    const { commands, say } = answerTo(intent, {
      state: store.snapshot.get().state,
      nowMs: store.nowMs(),
      tempC: liquidNow(store),
      meetingAtMs: view?.forecast?.kind === 'forecast' ? view.forecast.atMs : null,
      unit: temperature,
    });
    for (const command of commands) act(command);
    void alarmSounds.say(say);
  }, isRunning);

  const body = alert ? (
    <TakeOver onComplete={(stepIds) => stepIds.forEach(complete)} onAct={act} refusal={refusal} />
  ) : mustCheckSound ? (
    soundCheck
  ) : isRunning ? (
    <>
      <StepArea onStopTimer={(timerId) => act({ type: 'stopTimer', timerId })} />
      <ActBar
        onAct={act}
        onComplete={complete}
        onMeasure={(quantity) => setSheet({ kind: 'measure', quantity })}
        onExtra={(kind) => setSheet({ kind })}
        onAllSteps={() => setSheet({ kind: 'steps' })}
      />
    </>
  ) : (
    <Ended />
  );

  const close = () => setSheet(null);
  return (
    <main className="sheet" data-alert={alert?.stage} data-rehearsal={state.isRehearsal || undefined}>
      {ringer}
      <StatusLine />
      {rehearsal}
      <section className="fall" aria-label="Temperature" data-alone={!isRunning || undefined}>
        <FallLine />
        {isRunning ? <LiveTemperature /> : null}
      </section>
      {alert ? null : (
        <div className="slot">
          <Place state={state} />
          {refusal ? <Refusal text={refusal} /> : mustCheckSound ? null : strips}
          <Conflicts />
          <LastDone />
        </div>
      )}
      {body}
      <Foot
        onAct={act}
        onTimer={() => setSheet({ kind: 'timer' })}
        onAllSteps={() => setSheet({ kind: 'steps' })}
        onWipe={() => setIsWiping(true)}
      />
      {isWiping && sheet === null ? <WipeLock onOver={stopWiping} /> : null}

      <SheetDialog isOpen={sheet?.kind === 'note'} onClose={close} title="Note">
        <NoteSheet stepId={current?.step.id ?? null} onRecord={record} onClose={close} />
      </SheetDialog>
      <SheetDialog isOpen={sheet?.kind === 'measure'} onClose={close} title="Measure">
        <MeasureSheet
          quantity={sheet && 'quantity' in sheet ? sheet.quantity : (current?.step.asks ?? 'pH')}
          stepId={current?.step.id ?? null}
          done={current?.step.done ?? null}
          tempC={() => liquidNow(store)}
          onRecord={record}
          onClose={close}
        />
      </SheetDialog>
      <SheetDialog isOpen={sheet?.kind === 'timer'} onClose={close} title="Timer">
        <TimerSheet onRecord={record} onClose={close} />
      </SheetDialog>
      <SheetDialog isOpen={sheet?.kind === 'steps'} onClose={close} title="All steps" isSide>
        <AllSteps onAct={act} onClose={close} />
      </SheetDialog>
    </main>
  );
}

function Place({ state }: { state: RunState }) {
  const units = useUnits();
  const { number, count } = stepPosition(state);
  const current = currentStep(state);
  const condition = current ? conditionText(current.step, units) : null;
  return (
    <p className="slot-place">
      <span className="tabular-nums">
        {number} of {count}
      </span>
      {condition ? <span className="slot-condition">{condition}</span> : null}
    </p>
  );
}

function Refusal({ text }: { text: string }) {
  return (
    <div className="strip" role="alert">
      <ShapeGlyph shape="dash" className="size-7 shrink-0" />
      <p className="strip-text">{text}</p>
    </div>
  );
}

/** Two devices that say different things: shown once in words, then in the list of steps. */
function Conflicts() {
  const { entries } = useRun();
  const state = useRunState();
  const [seenCount, setSeenCount] = useState(0);
  const newest = state.conflicts.at(-1);
  if (!newest || state.conflicts.length <= seenCount) return null;
  return (
    <div className="strip" data-rank="low" role="status">
      <ShapeGlyph shape="dash" className="size-7 shrink-0" />
      <p className="strip-text">{conflictText(newest, state, entries)}</p>
      <PressButton className="strip-act" onPress={() => setSeenCount(state.conflicts.length)}>
        Seen
      </PressButton>
    </div>
  );
}
