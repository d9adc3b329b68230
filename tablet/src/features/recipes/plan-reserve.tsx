import type { Ingredient, Lot } from '@steepfall/shared/contracts';
import { freeG, ingredientOf } from '@steepfall/shared/desk';
import type { Addition, RecipeDocument } from '@steepfall/shared/sheets';
import { formatMass } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { useFieldArray, useFormContext, useWatch, type Control } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { ControlledQuantity } from '#components/controlled.tsx';
import { SelectField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { useUnits } from '#lib/units.ts';
import { localDate } from '#lib/words.ts';
import { missingG, type PlanDraft } from './plan-shelf.ts';

interface ReserveFieldsProps {
  document: RecipeDocument;
  stores: readonly Ingredient[];
  control: Control<PlanDraft>;
}

/** Each addition with the lots it comes from. What must be used first is proposed first; the person may choose otherwise. */
export function ReserveFields({ document, stores, control }: ReserveFieldsProps) {
  const { fields, append, remove } = useFieldArray({ control, name: 'reserve' });
  const reserve = useWatch({ control, name: 'reserve' });
  return (
    <section aria-labelledby="from-stores" className="grid gap-1">
      <LevelRule id="from-stores" level={3}>
        From the stores
      </LevelRule>
      <ul>
        {document.additions.map((addition) => (
          <AdditionLots
            key={addition.id}
            addition={addition}
            stores={stores}
            control={control}
            lines={reserve.flatMap((line, index) =>
              line.additionId === addition.id ? [{ ...line, index, key: fields[index]?.id ?? index }] : [],
            )}
            missing={missingG(addition, reserve)}
            onAdd={(lotId, massG) => append({ additionId: addition.id, lotId, massG })}
            onRemove={remove}
          />
        ))}
      </ul>
    </section>
  );
}

interface AdditionLotsProps {
  addition: Addition;
  stores: readonly Ingredient[];
  control: Control<PlanDraft>;
  lines: readonly { lotId: string; index: number; key: string | number }[];
  missing: number;
  onAdd: (lotId: string, massG: number) => void;
  onRemove: (index: number) => void;
}

function AdditionLots({ addition, stores, control, lines, missing, onAdd, onRemove }: AdditionLotsProps) {
  const { mass: unit } = useUnits();
  const taken = new Set(lines.map(({ lotId }) => lotId));
  const groups = groupsFor(addition, stores);
  const next = groups.flatMap(({ lots }) => lots).find((lot) => !taken.has(lot.id) && freeG(lot) > 0);
  return (
    <li className="grid gap-3 border-b border-hair py-4">
      <div className="flex flex-wrap items-baseline gap-x-5 gap-y-1">
        <p className="text-lead font-medium">{addition.name}</p>
        <p className="text-body tabular-nums text-soft">{formatMass(addition.massG, { unit })}</p>
        {missing > 0 ? (
          <StatusChip shape="diamond" tone="ember" className="tabular-nums">
            {formatMass(missing, { unit })}{' '}
            {lines.length > 0 ? 'short' : groups.length > 0 ? 'not set aside' : 'not in the stores'}
          </StatusChip>
        ) : null}
      </div>
      {lines.map(({ key, index }) => (
        <LotLine
          key={key}
          name={addition.name}
          index={index}
          control={control}
          groups={groups}
          onRemove={() => onRemove(index)}
        />
      ))}
      {next && missing > 0 ? (
        <div>
          <Button look="quiet" className="-ml-5" onClick={() => onAdd(next.id, Math.min(missing, freeG(next)))}>
            {lines.length === 0 ? 'Take it from another lot' : 'Add another lot'}
            <span className="sr-only"> for {addition.name}</span>
          </Button>
        </div>
      ) : null}
    </li>
  );
}

interface LotGroup {
  name: string;
  lots: readonly Lot[];
}

/** The ingredient that the addition stands for first, then the others of its kind. */
function groupsFor(addition: Addition, stores: readonly Ingredient[]): LotGroup[] {
  const meant = ingredientOf(addition, stores);
  const others = stores.filter(({ id, facts }) => facts.kind === addition.kind && id !== meant?.id);
  const first = stores.filter(({ id }) => id === meant?.id);
  return [...first, ...others]
    .map(({ facts, lots }) => ({ name: facts.name, lots: lots.filter(({ isRemoved }) => !isRemoved) }))
    .filter(({ lots }) => lots.length > 0);
}

interface LotLineProps {
  name: string;
  index: number;
  control: Control<PlanDraft>;
  groups: readonly LotGroup[];
  onRemove: () => void;
}

function LotLine({ name, index, control, groups, onRemove }: LotLineProps) {
  const { mass: unit } = useUnits();
  const { register } = useFormContext<PlanDraft>();
  return (
    <div className="grid grid-cols-[1fr_auto] items-start gap-x-4 gap-y-2 sm:grid-cols-[1fr_8.5rem_auto]">
      <div className="max-sm:col-span-2">
        <SelectField label={<span className="sr-only">Lot for {name}</span>} {...register(`reserve.${index}.lotId`)}>
          {groups.map((group) => (
            <optgroup key={group.name} label={group.name}>
              {group.lots.map((lot) => (
                <option key={lot.id} value={lot.id}>
                  {[
                    // What is chosen shows no head of its group: a lot of something else must say so itself.
                    ...(group.name === name ? [] : [group.name]),
                    lot.code,
                    `${formatMass(freeG(lot), { unit })} free`,
                    ...(lot.bestBefore ? [`before ${format(localDate(lot.bestBefore), 'MMM yyyy')}`] : []),
                  ].join(' · ')}
                </option>
              ))}
            </optgroup>
          ))}
        </SelectField>
      </div>
      <ControlledQuantity
        control={control}
        name={`reserve.${index}.massG`}
        kind="mass"
        label={<span className="sr-only">How much of it for {name}</span>}
      />
      <div className="-mr-5 pt-1.5">
        <Button look="quiet" onClick={onRemove}>
          Leave out<span className="sr-only"> this lot for {name}</span>
        </Button>
      </div>
    </div>
  );
}
