import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { createIngredientSchema, type Ingredient } from '@steepfall/shared/contracts';
import type { AcidKind, Salt, TeaKind } from '@steepfall/shared/figures';
import type { IngredientKind } from '@steepfall/shared/sheets';
import type { IngredientFacts } from '@steepfall/shared/stores';
import { useForm, useWatch, type Control, type Resolver, type UseFormRegister } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { ControlledNumber, ControlledQuantity } from '#components/controlled.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { Segmented } from '#components/segmented.tsx';
import { SendForm } from '#components/send-form.tsx';
import { choicesOf, hopFormNames, leafFormNames, teaNames } from '#lib/substance-names.ts';
import { acidJars, saltJars } from './facts-words.ts';
import { JarFields } from './jar-fields.tsx';
import { restOf, spreadProblems, useStoresAct, useStoresChange } from './use-stores.ts';

const kinds: { value: IngredientKind; label: string }[] = [
  { value: 'tea', label: 'Tea' },
  { value: 'hops', label: 'Hops' },
  { value: 'salt', label: 'Salt' },
  { value: 'acid', label: 'Acid' },
  { value: 'other', label: 'Other' },
];

const common = { name: '', lowStockG: null, allergens: '' };
/** What a new one starts with: the usual of its kind. */
const usualFacts: Record<IngredientKind, IngredientFacts> = {
  tea: { ...common, kind: 'tea', tea: 'green', form: 'whole', caffeineMgPerG: null },
  hops: { ...common, kind: 'hops', form: 'pellets' },
  salt: { ...common, kind: 'salt', salt: 'calciumChlorideDihydrate', assayPercent: 100 },
  acid: { ...common, kind: 'acid', acid: 'citricAnhydrous', strengthPercent: 100 },
  other: { ...common, kind: 'other' },
};

/** What the form holds; the contract decides what of it is right. */
interface IngredientDraft {
  facts: {
    kind: IngredientKind;
    name: string;
    lowStockG: number | null;
    allergens: string;
    tea?: TeaKind;
    form?: string;
    caffeineMgPerG?: number | null;
    salt?: Salt;
    assayPercent?: number | null;
    acid?: AcidKind;
    strengthPercent?: number | null;
  };
}

export function AddIngredientDialog({ onClose }: { onClose: () => void }) {
  const navigate = useNavigate();
  const [kind, setKind] = useState<IngredientKind>('tea');
  const add = useStoresAct((body: IngredientDraft) => ['stores/ingredients', { method: 'POST', body }]);
  return (
    <Dialog isOpen onClose={onClose} title="Add an ingredient">
      <div className="grid gap-5">
        <Segmented label="What is it?" value={kind} onChange={setKind} segments={kinds} />
        <IngredientForm
          key={kind}
          facts={usualFacts[kind]}
          act={add}
          onSend={(body, onError) =>
            add.mutate(body, { onSuccess: ({ id }) => void navigate(`/stores/${id}`), onError })
          }
          onClose={onClose}
          words={{ act: 'Add it', busyLabel: 'Adding', failedTitle: 'Nothing was added' }}
        />
      </div>
    </Dialog>
  );
}

export function EditIngredientDialog({ ingredient, onClose }: { ingredient: Ingredient; onClose: () => void }) {
  const { id, version } = ingredient;
  const save = useStoresChange<IngredientDraft>(
    `stores/ingredients/${id}`,
    version,
    (stores) => stores.find((each) => each.id === id)?.version,
  );
  return (
    <Dialog isOpen onClose={onClose} title={`Change ${ingredient.facts.name}`}>
      <IngredientForm
        facts={ingredient.facts}
        act={save}
        onSend={(body, onError) => save.send(body, { onSuccess: onClose, onError })}
        onClose={onClose}
        words={{ act: 'Save', busyLabel: 'Saving', failedTitle: 'It was not saved' }}
      />
    </Dialog>
  );
}

interface IngredientFormProps {
  facts: IngredientFacts;
  act: { isPending: boolean; error: Error | null };
  onSend: (body: IngredientDraft, onError: (error: Error) => void) => void;
  onClose: () => void;
  words: { act: string; busyLabel: string; failedTitle: string };
}

function IngredientForm({ facts, act, onSend, onClose, words }: IngredientFormProps) {
  const { control, register, handleSubmit, setError, setValue, formState } = useForm<IngredientDraft>({
    resolver: zodResolver(createIngredientSchema) as unknown as Resolver<IngredientDraft>,
    defaultValues: { facts },
  });
  const errors = formState.errors.facts;
  const send = handleSubmit((body) => onSend(body, (error) => spreadProblems(error, setError)));
  return (
    <SendForm
      onSubmit={(event) => void send(event)}
      onClose={onClose}
      isBusy={act.isPending}
      error={restOf(act.error)}
      {...words}
    >
      <TextField
        label="Name"
        hint="As you call it in a recipe."
        autoComplete="off"
        error={errors?.name?.message}
        {...register('facts.name')}
      />
      <KindFields kind={facts.kind} control={control} register={register} onSubstance={setValue} />
      <ControlledQuantity
        control={control}
        name="facts.lowStockG"
        kind="mass"
        label="Low when there is less than"
        hint="Leave it empty, and the stores keep quiet."
      />
      <TextField
        label="Allergens"
        hint="As it stands on the packet. They go onto the keg tag."
        autoComplete="off"
        error={errors?.allergens?.message}
        {...register('facts.allergens')}
      />
    </SendForm>
  );
}

interface KindFieldsProps {
  kind: IngredientKind;
  control: Control<IngredientDraft>;
  register: UseFormRegister<IngredientDraft>;
  onSubstance: (name: 'facts.salt' | 'facts.acid', value: Salt | AcidKind) => void;
}

function KindFields({ kind, control, register, onSubstance }: KindFieldsProps) {
  const [salt, acid] = useWatch({ control, name: ['facts.salt', 'facts.acid'] });
  switch (kind) {
    case 'tea':
      return (
        <>
          <SelectField label="Kind of tea" {...register('facts.tea')}>
            {optionsOf(teaNames)}
          </SelectField>
          <SelectField label="How it is cut" {...register('facts.form')}>
            {optionsOf(leafFormNames)}
          </SelectField>
          <ControlledNumber
            control={control}
            name="facts.caffeineMgPerG"
            label="Caffeine"
            unit="mg/g"
            hint="Only if its maker or a laboratory told you. Empty: as usual for its kind."
          />
        </>
      );
    case 'hops':
      return (
        <SelectField label="Form" {...register('facts.form')}>
          {optionsOf(hopFormNames)}
        </SelectField>
      );
    case 'salt':
      return (
        <>
          <JarFields
            label="Salt"
            jars={saltJars}
            value={salt ?? 'gypsum'}
            onChange={(value) => onSubstance('facts.salt', value)}
          />
          <ControlledNumber
            control={control}
            name="facts.assayPercent"
            label="How much of the jar is the salt"
            unit="%"
            hint="Assay or purity on the label. 100 if it says nothing."
          />
        </>
      );
    case 'acid':
      return (
        <>
          <JarFields
            label="Acid"
            jars={acidJars}
            value={acid ?? 'lactic'}
            onChange={(value) => onSubstance('facts.acid', value)}
          />
          <ControlledNumber
            control={control}
            name="facts.strengthPercent"
            label="Strength"
            unit="%"
            hint="By mass, from the label: 80 or 88 for lactic acid, 100 for a dry powder."
          />
        </>
      );
    case 'other':
      return null;
  }
}

function optionsOf<Key extends string>(names: Record<Key, string>) {
  return choicesOf(names).map(({ value, label }) => (
    <option key={value} value={value}>
      {label}
    </option>
  ));
}
