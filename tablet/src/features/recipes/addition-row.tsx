import { useId } from 'react';
import type { Ingredient } from '@steepfall/shared/contracts';
import type { Addition } from '@steepfall/shared/sheets';
import { NO_BREAK_SPACE } from '@steepfall/shared/units';
import { Menu } from '#components/menu.tsx';
import { quantityOf, useUnits } from '#lib/units.ts';
import { AdditionFacts } from './addition-facts.tsx';
import { Chevron } from './chevron.tsx';
import { conditionWords } from './condition-words.ts';
import { ConditionFields } from './condition-fields.tsx';
import { useDeskPlace } from './desk-place.tsx';
import { NumberField, type Scale } from './number-field.tsx';

interface AdditionRowProps {
  addition: Addition;
  index: number;
  waterL: number;
  stores: readonly Ingredient[];
  errorAt: (path: string) => string | undefined;
  onChange: (next: Addition) => void;
  onRemove: () => void;
  onMove: (step: 1 | -1) => void;
  isFirst: boolean;
  isLast: boolean;
}

/** Grams for each litre of water in the kettle. */
function perLitre(waterL: number): Scale {
  const litres = Number.isFinite(waterL) && waterL > 0 ? waterL : Number.NaN;
  return { symbol: 'g/L', fromInside: (massG) => massG / litres, toInside: (gPerL) => gPerL * litres };
}

/** One addition: its name, both amounts, and in words when it goes in and comes out. The rest opens under it. */
export function AdditionRow(props: AdditionRowProps) {
  const { addition, index, waterL, stores, errorAt, onChange, onRemove, onMove, isFirst, isLast } = props;
  const units = useUnits();
  const { isOpen, toggle } = useDeskPlace();
  const open = isOpen(addition.id);
  const detailsId = useId();
  const path = `additions.${index}`;
  const name = addition.name || 'without a name';
  const setMass = (massG: number | undefined) => onChange({ ...addition, massG: massG ?? Number.NaN });
  const isWrong = ['name', 'in.tempC', 'in.afterS', 'out.tempC', 'out.durationS', 'bag', 'alphaPercent'].some(errorAt);
  return (
    <li className="grid gap-2 border-b border-hair py-4 first:pt-0">
      <div className="flex items-start justify-between gap-3">
        <button
          type="button"
          aria-expanded={open}
          aria-controls={detailsId}
          onClick={() => toggle(addition.id)}
          className="group grid min-h-12 min-w-0 flex-1 cursor-pointer content-center text-left"
        >
          <span className="flex items-baseline gap-2 text-lead font-semibold">
            <span className="min-w-0 break-words">{name}</span>
            <Chevron isOpen={open} />
          </span>
          <span className="text-note text-soft underline decoration-hair underline-offset-4 group-hover:decoration-text">
            {conditionWords(addition, units)}
            {addition.bag ? `${NO_BREAK_SPACE}· ${addition.bag}` : ''}
          </span>
          {isWrong && !open ? (
            <span className="text-note font-medium text-ember">Something in here needs another look.</span>
          ) : null}
        </button>
        <Menu
          label={
            <>
              <span aria-hidden="true">⋯</span>
              <span className="sr-only">More for {name}</span>
            </>
          }
          choices={[
            { label: 'Move up', onChoose: () => onMove(-1), isDisabled: isFirst },
            { label: 'Move down', onChoose: () => onMove(1), isDisabled: isLast },
            { label: 'Take out', onChoose: onRemove, isDanger: true },
          ]}
        />
      </div>
      <div className="grid grid-cols-2 gap-3">
        <NumberField
          label={<Of name={name}>Amount</Of>}
          path={`${path}.massG`}
          scale={quantityOf('mass', units)}
          value={addition.massG}
          onChange={setMass}
          error={errorAt('massG')}
        />
        <NumberField
          label={<Of name={name}>For each litre</Of>}
          path={`${path}.gPerL`}
          scale={perLitre(waterL)}
          value={addition.massG}
          onChange={setMass}
        />
      </div>
      <div id={detailsId} hidden={!open}>
        {open ? (
          <div role="group" aria-label={name} className="grid gap-4 pt-2 pb-1">
            <AdditionFacts addition={addition} path={path} stores={stores} errorAt={errorAt} onChange={onChange} />
            <ConditionFields addition={addition} path={path} errorAt={errorAt} onChange={onChange} />
          </div>
        ) : null}
      </div>
    </li>
  );
}

/** The name is read with the label, and not shown a third time. */
function Of({ name, children }: { name: string; children: string }) {
  return (
    <>
      {children}
      <span className="sr-only"> of {name}</span>
    </>
  );
}
