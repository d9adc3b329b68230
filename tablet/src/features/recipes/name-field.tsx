import { useState } from 'react';
import {
  ComboboxButton,
  Combobox,
  ComboboxInput,
  ComboboxOption,
  ComboboxOptions,
  Description,
  Field,
  Label,
} from '@headlessui/react';
import type { Ingredient } from '@steepfall/shared/contracts';
import { classNames } from '#components/class-names.ts';
import { useUnits } from '#lib/units.ts';
import { Chevron } from './chevron.tsx';
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
  const [isTyping, setIsTyping] = useState(false);
  const wanted = value.trim().toLowerCase();
  // Before anything is typed the whole shelf; then only what fits, so that Enter never takes what nobody meant.
  const offered = isTyping ? stores.filter(({ facts }) => facts.name.toLowerCase().includes(wanted)) : stores;
  return (
    <Field className="grid gap-1.5">
      <Label>
        <SmallLabel>Name</SmallLabel>
      </Label>
      <Combobox<Ingredient | null>
        immediate
        value={null}
        onChange={(ingredient) => {
          if (ingredient) onTake(ingredient);
        }}
        onClose={() => setIsTyping(false)}
      >
        <span className="relative block">
          <ComboboxInput
            name={path}
            autoComplete="off"
            displayValue={() => value}
            value={value}
            aria-invalid={error ? true : undefined}
            onChange={({ target }) => {
              setIsTyping(true);
              onType(target.value);
            }}
            className={classNames(
              'min-h-12 w-full rounded-lg border-2 bg-raised px-4 text-body text-text',
              stores.length > 0 && 'pr-14',
              error ? 'border-ember' : 'border-edge',
            )}
          />
          {stores.length > 0 ? (
            <ComboboxButton
              aria-label="Choose from the stores"
              className="absolute inset-y-0 right-0 grid w-12 cursor-pointer place-items-center rounded-lg"
            >
              <Chevron isOpen={false} />
            </ComboboxButton>
          ) : null}
        </span>
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
