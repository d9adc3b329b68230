import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { LogEntry, RunCommand, RunEventOf, RunState, StepProgress } from '@steepfall/shared/runs';
import { formatTemp } from '@steepfall/shared/units';
import { HoldButton } from '#components/hold-button.tsx';
import { Segmented } from '#components/segmented.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { PressButton } from '#components/press-button.tsx';
import { useRun } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { BagsPanel } from './bags.tsx';
import { FiguresPanel } from './live-figures-panel.tsx';
import { measurementText } from './quantities.ts';
import { amountText } from './step-area.tsx';
import { conditionText, conflictText } from './sheet-words.ts';

type Part = 'steps' | 'figures' | 'bags';

/** The whole sheet: its steps, its figures so far, what is in which bag. */
export function AllSteps({ onAct, onClose }: { onAct: (command: RunCommand) => void; onClose: () => void }) {
  const [part, setPart] = useState<Part>('steps');
  return (
    <div className="grid gap-6">
      <Segmented<Part>
        label="Show"
        isLabelHidden
        value={part}
        onChange={setPart}
        segments={[
          { value: 'steps', label: 'Steps' },
          { value: 'figures', label: 'Figures' },
          { value: 'bags', label: 'Bags' },
        ]}
      />
      {part === 'steps' ? <StepList onAct={onAct} onClose={onClose} /> : null}
      {part === 'figures' ? <FiguresPanel /> : null}
      {part === 'bags' ? <BagsPanel /> : null}
    </div>
  );
}

/** The whole sheet as a list, what contradicts itself, and the way out. */
function StepList({ onAct, onClose }: { onAct: (command: RunCommand) => void; onClose: () => void }) {
  const units = useUnits();
  const { state, entries } = useRun();
  const ticked = tickedTasks(state, entries);
  const end = (outcome: 'finished' | 'abandoned') => {
    onAct({ type: 'endRun', outcome });
    onClose();
  };
  return (
    <div className="grid gap-8">
      <ol className="all-steps">
        {state.steps.map((progress) => (
          <StepLine key={progress.step.id} progress={progress} />
        ))}
      </ol>
      {state.conflicts.length > 0 ? (
        <section className="grid gap-2">
          <h3 className="text-lead font-semibold">Said twice</h3>
          <ul className="grid gap-2 text-body">
            {state.conflicts.map((conflict) => (
              <li key={conflict.eventIds.join()}>{conflictText(conflict, state, entries)}</li>
            ))}
          </ul>
        </section>
      ) : null}
      {state.notes.length > 0 ? (
        <section className="grid gap-2">
          <h3 className="text-lead font-semibold">Notes</h3>
          <ul className="grid gap-2 text-body">
            {state.notes.map(({ eventId, atMs, text }) => (
              <Recorded
                key={eventId}
                atMs={atMs}
                text={text}
                onTakeBack={() => onAct({ type: 'undoEvent', eventId, eventType: 'note.added' })}
              />
            ))}
          </ul>
        </section>
      ) : null}
      {state.measurements.length > 0 ? (
        <section className="grid gap-2">
          <h3 className="text-lead font-semibold">Measured</h3>
          <ul className="grid gap-2 text-body">
            {state.measurements.map((measurement) => (
              <Recorded
                key={measurement.eventId}
                atMs={measurement.atMs}
                text={measurementText(measurement, units)}
                onTakeBack={() =>
                  onAct({ type: 'undoEvent', eventId: measurement.eventId, eventType: 'measurement.recorded' })
                }
              />
            ))}
          </ul>
        </section>
      ) : null}
      {ticked.length > 0 ? (
        <section className="grid gap-2">
          <h3 className="text-lead font-semibold">Done meanwhile</h3>
          <ul className="grid gap-2 text-body">
            {ticked.map(({ key, atMs, text, eventIds }) => (
              <Recorded
                key={key}
                atMs={atMs}
                text={text}
                onTakeBack={() => {
                  for (const eventId of eventIds) onAct({ type: 'undoEvent', eventId, eventType: 'task.ticked' });
                }}
              />
            ))}
          </ul>
        </section>
      ) : null}
      <section className="grid gap-4">
        <h3 className="text-lead font-semibold">Leave or end</h3>
        <Link
          to="/"
          className="flex min-h-18 items-center justify-center rounded-xl border-2 border-edge px-7 text-lead font-medium"
        >
          Leave the sheet; the run goes on
        </Link>
        <HoldButton onHeld={() => end('finished')}>Press and hold to finish the run here</HoldButton>
        <HoldButton onHeld={() => end('abandoned')}>Press and hold to give the run up</HoldButton>
      </section>
    </div>
  );
}

interface TickedTask {
  key: string;
  text: string;
  atMs: number;
  /** Two tablets may have ticked the same task: it is taken back on both. */
  eventIds: string[];
}

function tickedTasks(state: RunState, entries: readonly LogEntry[]): TickedTask[] {
  const undone = new Set(state.undoneEventIds);
  return state.steps.flatMap(({ step, tickedTaskIds }) =>
    step.meanwhile
      .filter(({ id }) => tickedTaskIds.includes(id))
      .flatMap(({ id, text }) => {
        const ticks = entries.filter((entry) => {
          if (entry.type !== 'task.ticked' || undone.has(entry.id)) return false;
          const { payload } = entry as RunEventOf<'task.ticked'>;
          return payload.stepId === step.id && payload.taskId === id;
        });
        const [first] = ticks;
        if (!first) return [];
        return [{ key: `${step.id}/${id}`, text, atMs: first.atMs, eventIds: ticks.map((tick) => tick.id) }];
      }),
  );
}

/** Something that was written down, and the way to take it back. The log keeps both. */
function Recorded({ atMs, text, onTakeBack }: { atMs: number; text: string; onTakeBack: () => void }) {
  return (
    <li className="flex items-center gap-4">
      <span className="shrink-0 tabular-nums text-soft">{clockTime(atMs)}</span>
      <span className="min-w-0 flex-1">{text}</span>
      <PressButton
        className="min-h-18 shrink-0 rounded-xl border-2 border-edge px-5 font-medium"
        label={`Take it back: ${text}`}
        onPress={onTakeBack}
      >
        Take it back
      </PressButton>
    </li>
  );
}

function StepLine({ progress }: { progress: StepProgress }) {
  const { step, status, doneAtMs, tempC } = progress;
  const units = useUnits();
  return (
    <li data-status={status} aria-current={status === 'current' ? 'step' : undefined}>
      <ShapeGlyph
        shape={status === 'done' ? 'diamond' : status === 'current' ? 'dot' : 'ring'}
        className="size-5 shrink-0"
      />
      <span className="min-w-0 flex-1">
        <span className="sr-only">{status === 'done' ? 'Done: ' : status === 'current' ? 'Now: ' : ''}</span>
        <span className="text-lead font-medium">{step.title}</span>
        <span className="block text-body text-soft">
          {[conditionText(step, units), ...step.amounts.map((amount) => amountText(amount, units).what)]
            .filter(Boolean)
            .join(' · ')}
        </span>
      </span>
      {doneAtMs !== null ? (
        <span className="shrink-0 text-right text-body tabular-nums text-soft">
          {clockTime(doneAtMs)}
          {tempC !== null ? <span className="block">{formatTemp(tempC, { unit: units.temperature })}</span> : null}
        </span>
      ) : null}
    </li>
  );
}
