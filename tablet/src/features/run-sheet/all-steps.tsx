import { Link } from 'react-router-dom';
import type { RunCommand, StepProgress } from '@steepfall/shared/runs';
import { formatTemp } from '@steepfall/shared/units';
import { HoldButton } from '#components/hold-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { useRun } from '#lib/run-store/run-context.tsx';
import { amountText } from './step-area.tsx';
import { conditionText, conflictText } from './sheet-words.ts';

function timeText(atMs: number): string {
  return new Date(atMs).toLocaleTimeString([], { hour: '2-digit', minute: '2-digit' });
}

/** The whole sheet as a list, what contradicts itself, and the way out. */
export function AllSteps({ onAct, onClose }: { onAct: (command: RunCommand) => void; onClose: () => void }) {
  const { state, entries } = useRun();
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
              <li key={eventId}>
                <span className="tabular-nums text-soft">{timeText(atMs)}</span> {text}
              </li>
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

function StepLine({ progress }: { progress: StepProgress }) {
  const { step, status, doneAtMs, tempC } = progress;
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
          {[conditionText(step), ...step.amounts.map((amount) => amountText(amount).what)].filter(Boolean).join(' · ')}
        </span>
      </span>
      {doneAtMs !== null ? (
        <span className="shrink-0 text-right text-body tabular-nums text-soft">
          {timeText(doneAtMs)}
          {tempC !== null ? <span className="block">{formatTemp(tempC, { unit: 'C' })}</span> : null}
        </span>
      ) : null}
    </li>
  );
}
