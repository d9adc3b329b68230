import type { Ingredient } from '@steepfall/shared/contracts';
import type { Addition, IngredientKind } from '@steepfall/shared/sheets';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { offerUndo } from '#lib/undo.ts';
import { AdditionRow } from './addition-row.tsx';
import { newAddition } from './recipe-form.ts';
import { useDeskPlace } from './desk-place.tsx';
import { usePart, useValueOf } from './use-part.ts';

const addWords: Record<IngredientKind, string> = {
  salt: 'Add a salt',
  acid: 'Add an acid',
  tea: 'Add a tea',
  hops: 'Add hops',
  other: 'Add something else',
};

interface AdditionsPartProps {
  title: string;
  kinds: readonly IngredientKind[];
  /** Said while there is none. */
  empty: string;
  stores: readonly Ingredient[];
}

/** The additions of some kinds, in the order of the recipe. A blend is several of one kind. */
export function AdditionsPart({ title, kinds, empty, stores }: AdditionsPartProps) {
  const { value: additions, change, errorAt } = usePart('additions');
  const waterL = useValueOf('waterL');
  const { openPath, restoreAddition } = useDeskPlace();
  const shown = additions.flatMap((addition, index) => (kinds.includes(addition.kind) ? [{ addition, index }] : []));

  const add = (kind: IngredientKind) => {
    const added = newAddition(kind, waterL);
    change([...additions, added]);
    openPath(`additions.${additions.length}.name`);
  };
  const remove = (index: number) => {
    const removed = additions[index];
    if (!removed) return;
    change(additions.toSpliced(index, 1));
    offerUndo(`${removed.name || 'The addition'} taken out.`, () => {
      restoreAddition(removed, index);
      return Promise.resolve();
    });
  };

  return (
    <section aria-label={title} className="grid gap-3">
      <LevelRule>{title}</LevelRule>
      {shown.length === 0 ? <p className="text-body text-soft">{empty}</p> : null}
      <ul className="grid">
        {shown.map(({ addition, index }, place) => (
          <AdditionRow
            key={addition.id}
            addition={addition}
            index={index}
            waterL={waterL}
            stores={stores}
            errorAt={(path) => errorAt(`${index}.${path}`)}
            onChange={(next) => change(additions.with(index, next))}
            onRemove={() => remove(index)}
            onMove={(step) => {
              const other = shown[place + step]?.index;
              if (other !== undefined) change(swapped(additions, index, other));
            }}
            isFirst={place === 0}
            isLast={place === shown.length - 1}
          />
        ))}
      </ul>
      <div className="flex flex-wrap gap-x-2 gap-y-2">
        {kinds.map((kind) => (
          <Button key={kind} onClick={() => add(kind)}>
            {addWords[kind]}
          </Button>
        ))}
      </div>
      {errorAt() ? (
        <p role="alert" className="text-note font-medium text-ember">
          {errorAt()}
        </p>
      ) : null}
    </section>
  );
}

function swapped(list: readonly Addition[], one: number, other: number): Addition[] {
  const next = [...list];
  const [a, b] = [next[one], next[other]];
  if (!a || !b) return next;
  next[one] = b;
  next[other] = a;
  return next;
}
