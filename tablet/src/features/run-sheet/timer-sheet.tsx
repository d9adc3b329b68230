import { useState, type FormEvent } from 'react';
import type { Decision, RunCommand } from '@steepfall/shared/runs';
import { Button } from '#components/button.tsx';
import { NumberPad, typed } from './number-pad.tsx';

const PRESETS_MIN = [1, 3, 5, 10, 20];

interface TimerSheetProps {
  onRecord: (command: RunCommand) => Promise<Decision>;
  onClose: () => void;
}

/** A timer of one's own, by the minute. */
export function TimerSheet({ onRecord, onClose }: TimerSheetProps) {
  const [text, setText] = useState('');
  const [label, setLabel] = useState('');
  const [error, setError] = useState<string | null>(null);

  const start = async (minutes: number) => {
    const decision = await onRecord({ type: 'startTimer', label: label.trim() || 'Timer', durationS: minutes * 60 });
    if (decision.ok) onClose();
    else setError(decision.problem.detail);
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const minutes = Number(text);
    if (text === '' || !(minutes > 0)) setError('Type how many minutes.');
    else void start(minutes);
  };

  return (
    <form className="measure" onSubmit={submit}>
      <div className="measure-side">
        <div className="flex flex-wrap gap-3" role="group" aria-label="Start at once">
          {PRESETS_MIN.map((minutes) => (
            <Button key={minutes} size="sheet" onClick={() => void start(minutes)}>
              {minutes} min
            </Button>
          ))}
        </div>
        <label className="grid gap-1.5 text-lead">
          What for
          <input
            value={label}
            onChange={({ target }) => setLabel(target.value)}
            maxLength={60}
            placeholder="Timer"
            className="min-h-18 rounded-xl border-2 border-edge bg-raised px-5 text-lead text-text"
          />
        </label>
        <label className="measure-value">
          <span className="sr-only">Minutes</span>
          <input
            value={text}
            inputMode="none"
            autoComplete="off"
            placeholder="–"
            onChange={({ target }) => {
              if (/^\d{0,4}\.?\d{0,2}$/.test(target.value)) setText(target.value);
            }}
          />
          <span aria-hidden="true">min</span>
        </label>
        {error ? (
          <p role="alert" className="text-lead text-ember">
            {error}
          </p>
        ) : null}
        <Button type="submit" look="primary" size="sheet" className="measure-save">
          Start
        </Button>
      </div>
      <NumberPad
        onKey={(key) => {
          setError(null);
          setText((before) => typed(before, key));
        }}
      />
    </form>
  );
}
