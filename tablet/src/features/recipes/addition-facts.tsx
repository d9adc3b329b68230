import type { Ingredient } from '@steepfall/shared/contracts';
import type { AcidKind, LeafForm, Salt, TeaKind } from '@steepfall/shared/figures';
import type { Addition } from '@steepfall/shared/sheets';
import { SelectField, TextField } from '#components/field.tsx';
import { Segmented } from '#components/segmented.tsx';
import {
  acidNames,
  choicesOf,
  hopFormNames,
  leafFormNames,
  saltNames,
  shortName,
  teaNames,
} from '#lib/substance-names.ts';
import { fromStores } from './from-stores.ts';
import { NameField } from './name-field.tsx';
import { NumberField, plainScale, SmallLabel } from './number-field.tsx';

interface AdditionFactsProps {
  addition: Addition;
  path: string;
  stores: readonly Ingredient[];
  errorAt: (path: string) => string | undefined;
  onChange: (next: Addition) => void;
}

/** What it is, where it waits, and what of it stays when the volume changes. */
export function AdditionFacts({ addition, path, stores, errorAt, onChange }: AdditionFactsProps) {
  return (
    <>
      <NameField
        value={addition.name}
        path={`${path}.name`}
        error={errorAt('name')}
        stores={stores.filter(({ facts }) => facts.kind === addition.kind)}
        onType={(name) => {
          const { ingredientId: _other, ...rest } = addition;
          onChange({ ...rest, name });
        }}
        onTake={(ingredient) => onChange(fromStores(addition, ingredient, Date.now()))}
      />
      <KindFacts addition={addition} path={path} errorAt={errorAt} onChange={onChange} />
      <TextField
        label={<SmallLabel>Waits in</SmallLabel>}
        name={`${path}.bag`}
        placeholder="bag 2"
        value={addition.bag ?? ''}
        error={errorAt('bag')}
        onChange={({ target }) => onChange(withBag(addition, target.value))}
      />
      <Segmented
        label="When the volume changes, keep"
        value={addition.keeps}
        onChange={(keeps) => onChange({ ...addition, keeps })}
        segments={[
          { value: 'g-per-l', label: 'g/L' },
          { value: 'mass', label: 'the amount' },
        ]}
      />
    </>
  );
}

function withBag(addition: Addition, text: string): Addition {
  const { bag: _old, ...rest } = addition;
  return text === '' ? rest : { ...rest, bag: text };
}

function KindFacts({ addition, path, errorAt, onChange }: Omit<AdditionFactsProps, 'stores'>) {
  switch (addition.kind) {
    case 'salt':
      return (
        <>
          <Choice
            label="Which salt"
            path={`${path}.salt`}
            names={saltNames}
            value={addition.salt}
            onChange={(salt: Salt) =>
              onChange({ ...addition, salt, name: renamed(addition.name, saltNames[addition.salt], saltNames[salt]) })
            }
          />
          <NumberField
            label="How much of the jar is the salt"
            path={`${path}.assayPercent`}
            scale={plainScale('%')}
            isOptional
            placeholder="100"
            value={addition.assayPercent}
            error={errorAt('assayPercent')}
            onChange={(assayPercent) => onChange({ ...addition, assayPercent })}
          />
        </>
      );
    case 'acid':
      return (
        <>
          <Choice
            label="Which acid"
            path={`${path}.acid`}
            names={acidNames}
            value={addition.acid}
            onChange={(acid: AcidKind) =>
              onChange({ ...addition, acid, name: renamed(addition.name, acidNames[addition.acid], acidNames[acid]) })
            }
          />
          <NumberField
            label="Strength"
            path={`${path}.strengthPercent`}
            scale={plainScale('%')}
            isOptional
            placeholder="100"
            value={addition.strengthPercent}
            error={errorAt('strengthPercent')}
            onChange={(strengthPercent) => onChange({ ...addition, strengthPercent })}
          />
        </>
      );
    case 'tea':
      return (
        <>
          <div className="grid gap-4 @md:grid-cols-2 @md:gap-3">
            <Choice
              label="Kind"
              path={`${path}.tea`}
              names={teaNames}
              value={addition.tea}
              onChange={(tea: TeaKind) => onChange({ ...addition, tea })}
            />
            <Choice
              label="Cut"
              path={`${path}.form`}
              names={leafFormNames}
              value={addition.form}
              onChange={(form: LeafForm) => onChange({ ...addition, form })}
            />
          </div>
          <NumberField
            label="Caffeine in the leaf, if its maker tells it"
            path={`${path}.caffeineMgPerG`}
            scale={plainScale('mg/g')}
            isOptional
            placeholder="usual"
            value={addition.caffeineMgPerG}
            error={errorAt('caffeineMgPerG')}
            onChange={(caffeineMgPerG) => onChange({ ...addition, caffeineMgPerG })}
          />
        </>
      );
    case 'hops':
      return (
        <>
          <Choice
            label="Form"
            path={`${path}.form`}
            names={hopFormNames}
            value={addition.form}
            onChange={(form: keyof typeof hopFormNames) => onChange({ ...addition, form })}
          />
          <div className="grid grid-cols-2 gap-3">
            <NumberField
              label="Alpha acids today"
              path={`${path}.alphaPercent`}
              scale={plainScale('%')}
              value={addition.alphaPercent}
              error={errorAt('alphaPercent')}
              onChange={(alphaPercent = Number.NaN) => onChange({ ...addition, alphaPercent })}
            />
            <NumberField
              label="Storage index"
              path={`${path}.storageIndex`}
              scale={plainScale()}
              isOptional
              placeholder="not known"
              value={addition.storageIndex}
              error={errorAt('storageIndex')}
              onChange={(storageIndex) => onChange({ ...addition, storageIndex })}
            />
          </div>
        </>
      );
    case 'other':
      return null;
  }
}

/** A name that was never changed by hand follows the substance. */
function renamed(name: string, before: string, after: string): string {
  return name === '' || name === shortName(before) ? shortName(after) : name;
}

interface ChoiceProps<Key extends string> {
  label: string;
  path: string;
  names: Record<Key, string>;
  value: Key;
  onChange: (value: Key) => void;
}

function Choice<Key extends string>({ label, path, names, value, onChange }: ChoiceProps<Key>) {
  return (
    <SelectField
      label={<SmallLabel>{label}</SmallLabel>}
      name={path}
      value={value}
      onChange={({ target }) => onChange(target.value as Key)}
    >
      {choicesOf(names).map((choice) => (
        <option key={choice.value} value={choice.value}>
          {choice.label}
        </option>
      ))}
    </SelectField>
  );
}
