import { Combobox, ComboboxInput, ComboboxOption, ComboboxOptions, Description, Field, Label } from '@headlessui/react';
import type { Ingredient } from '@steepfall/shared/contracts';
import { classNames } from '#components/class-names.ts';
import { useUnits } from '#lib/units.ts';
import { stockWords } from './from-stores.ts';
import { SmallLabel } from './number-field.tsx';

interface NameFieldProps {
  value: string;
  path: string;
  error: string | undefined;
  /** What the stores hold of this kind. */
  stores: readonly Ingredient[];
  onType: (name: string) => void;
  onTake: (ingredient: Ingredient) => void;
}

/** A name to type freely, or one from the stores, which brings what is known of it along. */
export function NameField({ value, path, error, stores, onType, onTake }: NameFieldProps) {
  const units = useUnits();
  const wanted = value.trim().toLowerCase();
  const fitting = stores.filter(({ facts }) => facts.name.toLowerCase().includes(wanted));
  const offered = fitting.length > 0 ? fitting : stores;
  return (
    <Field className="grid gap-1.5">
      <Label>
        <SmallLabel>Name</SmallLabel>
      </Label>
      <Combobox<Ingredient | null>
        immediate={stores.length > 0}
        value={null}
        onChange={(ingredient) => {
          if (ingredient) onTake(ingredient);
        }}
      >
        <ComboboxInput
          name={path}
          autoComplete="off"
          displayValue={() => value}
          value={value}
          aria-invalid={error ? true : undefined}
          onChange={({ target }) => onType(target.value)}
          className={classNames(
            'min-h-12 w-full rounded-lg border-2 bg-raised px-4 text-body text-text',
            error ? 'border-ember' : 'border-edge',
          )}
        />
        {offered.length > 0 ? (
          <ComboboxOptions
            anchor={{ to: 'bottom start', gap: 4 }}
            modal={false}
            className="z-50 max-h-80! w-(--input-width) rounded-lg border-2 border-text bg-raised p-1.5 text-text empty:hidden"
          >
            {offered.map((ingredient) => (
              <ComboboxOption
                key={ingredient.id}
                value={ingredient}
                className="flex min-h-12 cursor-pointer flex-wrap items-center justify-between gap-x-4 rounded px-4 py-1.5 text-body data-focus:bg-text data-focus:text-ground"
              >
                <span>{ingredient.facts.name}</span>
                <span className="text-note">{stockWords(ingredient, units)}</span>
              </ComboboxOption>
            ))}
          </ComboboxOptions>
        ) : null}
      </Combobox>
      {error ? (
        <Description role="alert" className="text-note font-medium text-ember">
          {error}
        </Description>
      ) : null}
    </Field>
  );
}
