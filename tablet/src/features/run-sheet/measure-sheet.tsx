import { useState, type FormEvent } from 'react';
import { measurableRange, isInRange, type Decision, type RunCommand } from '@steepfall/shared/runs';
import type { DoneCondition, MeasuredQuantity } from '@steepfall/shared/sheets';
import { Button } from '#components/button.tsx';
import { Segmented } from '#components/segmented.tsx';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { AcidDose, AcidHint } from './acid-dose.tsx';
import { NumberPad, typed } from './number-pad.tsx';
import { quantityNames, typedQuantity } from './quantities.ts';

interface MeasureSheetProps {
  quantity: MeasuredQuantity;
  stepId: string | null;
  done: DoneCondition | null;
  /** The liquid at the instant of the tap. */
  tempC: () => number | null;
  onRecord: (command: RunCommand) => Promise<Decision>;
  onClose: () => void;
}

const offered: readonly MeasuredQuantity[] = ['pH', 'tempC', 'volumeL'];

/** One number, typed on keys that a wet finger hits. */
export function MeasureSheet({ quantity: first, stepId: ofStep, done, tempC, onRecord, onClose }: MeasureSheetProps) {
  const [asksForAcid, setAsksForAcid] = useState(false);
  /** A pH that is written down, and asks for something. */
  const [keptPh, setKeptPh] = useState<number | null>(null);
  /** The step whose acid is typed in after it. */
  const [acidStepId, setAcidStepId] = useState<string | null>(null);
  const [quantity, setQuantity] = useState(first);
  const [text, setText] = useState('');
  const [error, setError] = useState<string | null>(null);
  const units = useUnits();
  const name = quantityNames[quantity];
  const { symbol, fromInside, toInside } = typedQuantity(quantity, units);
  const value = text === '' ? Number.NaN : toInside(Number(text));
  const shown = (inside: number | undefined) => (inside === undefined ? 'any' : Number(fromInside(inside).toFixed(2)));
  const stepId = acidStepId ?? ofStep;
  const choices = acidStepId !== null ? (['massG'] as const) : offered.includes(first) ? offered : [first, ...offered];
  const wanted = done?.by === 'measurement' && done.quantity === quantity ? done : null;
  const isWanted = wanted !== null && isInRange(wanted, quantity, value);

  const record = async (event: FormEvent) => {
    event.preventDefault();
    const { min, max } = measurableRange[quantity];
    if (!Number.isFinite(value)) return setError(`Type a number from ${shown(min)} to ${shown(max)}.`);
    const decision = await onRecord({ type: 'recordMeasurement', quantity, value, stepId, tempC: tempC() });
    if (decision.ok && quantity === 'pH' && asksForAcid) setKeptPh(value);
    else if (decision.ok) onClose();
    else setError(inPersonsWords(decision.problem.detail, units));
  };

  if (keptPh !== null && acidStepId === null) {
    const type = (acidStep: string) => {
      setAcidStepId(acidStep);
      setQuantity('massG');
      setText('');
    };
    return <AcidDose ph={keptPh} onRecord={onRecord} onOther={type} onClose={onClose} />;
  }
  return (
    <form className="measure" onSubmit={(event) => void record(event)}>
      <div className="measure-side">
        <Segmented
          label="What was measured"
          isLabelHidden
          value={quantity}
          onChange={(next) => {
            setQuantity(next);
            setError(null);
          }}
          segments={choices.map((choice) => ({ value: choice, label: quantityNames[choice] }))}
        />
        <label className="measure-value">
          <span className="sr-only">
            {name} {symbol}
          </span>
          <input
            value={text}
            inputMode="none"
            autoComplete="off"
            autoFocus
            placeholder="–"
            onChange={({ target }) => {
              if (/^\d{0,7}\.?\d{0,4}$/.test(target.value)) setText(target.value);
            }}
          />
          <span aria-hidden="true">{quantity === 'pH' ? 'pH' : symbol}</span>
        </label>
        <p className="text-lead" role="status">
          {error ? <span className="text-ember">{error}</span> : null}
          {!error && wanted ? (
            <span className="text-soft">
              Wanted: {shown(wanted.min)} to {shown(wanted.max)}.{' '}
              {Number.isFinite(value)
                ? isWanted
                  ? 'In range: the step is done then.'
                  : 'Out of range: it is kept, and the step waits.'
                : ''}
            </span>
          ) : null}
          {!error && quantity === 'pH' ? (
            <AcidHint ph={value} isShown={text.includes('.')} onAsks={setAsksForAcid} />
          ) : null}
        </p>
        <Button type="submit" look="primary" size="sheet" className="measure-save">
          Keep it
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
