import { useId, useState } from 'react';
import type { WaterPart } from '@steepfall/shared/sheets';
import { useFormContext } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Segmented } from '#components/segmented.tsx';
import { offerUndo } from '#lib/undo.ts';
import { Chevron } from './chevron.tsx';
import { NumberField, plainScale, SmallLabel } from './number-field.tsx';
import { newWater, type RecipeForm } from './recipe-form.ts';
import { usePart } from './use-part.ts';

const ions = [
  { key: 'caMgPerL', word: 'Calcium' },
  { key: 'mgMgPerL', word: 'Magnesium' },
  { key: 'naMgPerL', word: 'Sodium' },
  { key: 'kMgPerL', word: 'Potassium' },
  { key: 'clMgPerL', word: 'Chloride' },
  { key: 'so4MgPerL', word: 'Sulfate' },
] as const;
const mgPerL = plainScale('mg/L');
const percentScale = plainScale('%');

/** How much water, and which: several are poured together by their share. */
export function WaterSection() {
  const { getValues } = useFormContext<RecipeForm>();
  const { value: waters, change, errorAt } = usePart('waters');
  const sum = waters.reduce((total, { percent }) => total + percent, 0);
  const remove = (index: number) => {
    const taken = waters[index];
    if (!taken) return;
    change(shared(waters.toSpliced(index, 1)));
    offerUndo(`${taken.name || 'The water'} taken out.`, () => {
      // Into the waters as they are by then.
      const now = getValues('document').waters;
      if (!now.some(({ id }) => id === taken.id)) change(shared([...now, taken]));
      return Promise.resolve();
    });
  };
  return (
    <section aria-label="Water" className="grid gap-4">
      <LevelRule>Water</LevelRule>
      <ul className="grid">
        {waters.map((part, index) => (
          <WaterRow
            key={part.id}
            part={part}
            path={`waters.${index}`}
            isOnly={waters.length === 1}
            errorAt={(path) => errorAt(`${index}.${path}`)}
            onChange={(next) => change(waters.with(index, next))}
            onRemove={() => remove(index)}
          />
        ))}
      </ul>
      {errorAt() ? (
        <p role="alert" className="text-note font-medium text-ember">
          {errorAt()}
          {Number.isFinite(sum) && waters.length > 1 ? ` Now they are ${Number(sum.toFixed(2))} %.` : ''}
        </p>
      ) : null}
      {waters.length < 6 ? (
        <div>
          <Button
            onClick={() => change([...waters, newWater(Math.max(0, Math.round(100 - sum) || 0), 'Another water')])}
          >
            Add a water
          </Button>
        </div>
      ) : null}
    </section>
  );
}

/** What the others leave of the whole, the first one has. */
function shared(waters: WaterPart[]): WaterPart[] {
  const [first, ...rest] = waters;
  if (!first) return waters;
  const others = rest.reduce((sum, { percent }) => sum + percent, 0);
  return Number.isFinite(others) && others <= 100 ? [{ ...first, percent: 100 - others }, ...rest] : waters;
}

interface WaterRowProps {
  part: WaterPart;
  path: string;
  isOnly: boolean;
  errorAt: (path: string) => string | undefined;
  onChange: (next: WaterPart) => void;
  onRemove: () => void;
}

function WaterRow({ part, path, isOnly, errorAt, onChange, onRemove }: WaterRowProps) {
  const [isOpen, setIsOpen] = useState(false);
  const detailsId = useId();
  const { report } = part;
  const isWrong = ions.some(({ key }) => errorAt(`report.${key}`)) || Boolean(errorAt('report.alkalinity.mgPerL'));
  const open = isOpen || isWrong;
  return (
    <li className="grid gap-3 border-b border-hair py-4 first:pt-0">
      <div className={`grid items-end gap-3 ${isOnly ? '' : 'grid-cols-[1fr_8.5rem]'}`}>
        <TextField
          label={<SmallLabel>{isOnly ? 'Which water' : 'Water'}</SmallLabel>}
          name={`${path}.name`}
          value={part.name}
          error={errorAt('name')}
          onChange={({ target }) => onChange({ ...part, name: target.value })}
        />
        {isOnly ? null : (
          <NumberField
            label={
              <>
                Share<span className="sr-only"> of {part.name}</span>
              </>
            }
            path={`${path}.percent`}
            scale={percentScale}
            value={part.percent}
            error={errorAt('percent')}
            onChange={(percent = Number.NaN) => onChange({ ...part, percent })}
          />
        )}
      </div>
      <div className="flex flex-wrap items-center justify-between gap-3">
        <button
          type="button"
          aria-expanded={open}
          aria-controls={detailsId}
          onClick={() => setIsOpen(!open)}
          className="flex min-h-12 cursor-pointer items-center gap-2 text-left text-note text-soft underline decoration-hair underline-offset-4 hover:decoration-text"
        >
          {reportWords(part)} <Chevron isOpen={open} />
        </button>
        {isOnly ? null : (
          <Button look="quiet" onClick={onRemove}>
            Take out<span className="sr-only"> {part.name}</span>
          </Button>
        )}
      </div>
      <div id={detailsId} hidden={!open}>
        {open ? (
          <div className="grid grid-cols-2 gap-3">
            {ions.map(({ key, word }) => (
              <NumberField
                key={key}
                label={word}
                path={`${path}.report.${key}`}
                scale={mgPerL}
                isOptional={key === 'kMgPerL'}
                placeholder={key === 'kMgPerL' ? 'not told' : ''}
                value={report[key]}
                error={errorAt(`report.${key}`)}
                onChange={(value) => onChange({ ...part, report: { ...report, [key]: value } })}
              />
            ))}
            <NumberField
              label="Alkalinity"
              path={`${path}.report.alkalinity.mgPerL`}
              scale={mgPerL}
              value={report.alkalinity.mgPerL}
              error={errorAt('report.alkalinity.mgPerL')}
              onChange={(value = Number.NaN) =>
                onChange({ ...part, report: { ...report, alkalinity: { ...report.alkalinity, mgPerL: value } } })
              }
            />
            <div className="self-end">
              <Segmented
                label="Alkalinity is told as"
                isLabelHidden
                value={report.alkalinity.as}
                onChange={(as) =>
                  onChange({ ...part, report: { ...report, alkalinity: { ...report.alkalinity, as } } })
                }
                segments={[
                  { value: 'hco3', label: 'HCO₃' },
                  { value: 'caco3', label: 'CaCO₃' },
                ]}
              />
            </div>
          </div>
        ) : null}
      </div>
    </li>
  );
}

/** "Ca 12, alkalinity 40 as HCO₃": enough to know one water from another. */
function reportWords({ report }: WaterPart): string {
  const { as, mgPerL: alkalinity } = report.alkalinity;
  return `Report: Ca ${report.caMgPerL || 0}, Mg ${report.mgMgPerL || 0}, alkalinity ${alkalinity || 0} as ${as === 'hco3' ? 'HCO₃' : 'CaCO₃'}`;
}
