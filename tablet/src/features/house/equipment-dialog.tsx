import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createEquipmentSchema, equipmentSchema, type Equipment } from '@steepfall/shared/contracts';
import type { HeatSource } from '@steepfall/shared/figures';
import { cautionWords } from '@steepfall/shared/sheets';
import {
  Controller,
  useForm,
  useWatch,
  type Control,
  type FieldError,
  type Resolver,
  type UseFormRegister,
  type UseFormSetValue,
} from 'react-hook-form';
import { CautionMark } from '#components/caution-mark.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { QuantityField } from '#components/quantity-field.tsx';
import { Segmented } from '#components/segmented.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { equipmentQuery } from '#lib/hub-queries.ts';
import { fieldProblems } from '#lib/words.ts';
import {
  efficiencyHint,
  factFields,
  heatFields,
  heatSourceWords,
  kindWords,
  learnedField,
  metalWords,
  proposedEfficiency,
  usualFacts,
  type FactField,
  type Kind,
} from './equipment-facts.ts';
import { useVersion } from '#lib/save-at-version.ts';
import { SendForm } from '#components/send-form.tsx';

/** What the form holds; the contract decides what of it is right. */
interface Draft {
  kind: Kind;
  name: string;
  facts: Record<string, unknown>;
}

const checked = zodResolver(createEquipmentSchema) as unknown as Resolver<Draft>;

/** A field that was emptied is a fact that nobody tells. */
function withoutEmpty(draft: Draft): Draft {
  return { ...draft, facts: Object.fromEntries(Object.entries(draft.facts).filter(([, value]) => value !== null)) };
}

const kinds = (Object.keys(kindWords) as Kind[]).map((value) => ({ value, label: kindWords[value] }));

/** Adds a piece, or changes one that is there. */
export function EquipmentDialog({ item, onClose }: { item: Equipment | null; onClose: () => void }) {
  const [kind, setKind] = useState<Kind>(item?.kind ?? 'kettle');
  return (
    <Dialog isOpen onClose={onClose} size="wide" title={item ? item.name : 'Add equipment'}>
      <div className="grid gap-6">
        {item ? null : <Segmented label="What is it?" value={kind} onChange={setKind} segments={kinds} />}
        <EquipmentForm key={kind} kind={kind} item={item} onClose={onClose} />
      </div>
    </Dialog>
  );
}

function EquipmentForm({ kind, item, onClose }: { kind: Kind; item: Equipment | null; onClose: () => void }) {
  const client = useQueryClient();
  const { version, meet } = useVersion(item?.version ?? 1);
  const { register, control, setValue, handleSubmit, setError, formState } = useForm<Draft>({
    resolver: (draft, context, options) => checked(withoutEmpty(draft), context, options),
    defaultValues: { kind, name: item?.name ?? '', facts: item?.facts ?? usualFacts[kind] },
  });
  const save = useMutation({
    mutationFn: (body: Draft) =>
      item
        ? callHubFor(equipmentSchema, `equipment/${item.id}`, { method: 'PATCH', body: { ...body, version } })
        : callHubFor(equipmentSchema, 'equipment', { method: 'POST', body }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: equipmentQuery.queryKey });
      onClose();
    },
    onError: (error) => {
      for (const { field, detail } of fieldProblems(error)) setError(field as 'name', { message: detail });
      void meet(error, async () => {
        const all = await client.fetchQuery({ ...equipmentQuery, staleTime: 0 });
        return all.find(({ id }) => id === item?.id)?.version;
      });
    },
  });
  const fields = { control, register };
  return (
    <SendForm
      onSubmit={(event) => void handleSubmit((body) => save.mutate(body))(event)}
      onClose={onClose}
      act={item ? 'Save' : 'Add'}
      busyLabel={item ? 'Saving' : 'Adding'}
      isBusy={save.isPending}
      failedTitle={item ? 'It was not saved' : 'Nothing was added'}
      error={save.isError && fieldProblems(save.error).length === 0 ? save.error : null}
    >
      <TextField
        label="Name"
        hint={kind === 'keg' ? 'As it is written on the keg.' : undefined}
        autoComplete="off"
        error={formState.errors.name?.message}
        {...register('name')}
      />
      <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">
        {kind === 'chiller' ? (
          <SelectField label="Metal of the coil" {...register('facts.metal')}>
            <option value="stainless">stainless steel</option>
            <option value="copper">copper</option>
          </SelectField>
        ) : null}
        {factFields[kind].map((field) => (
          <Fact key={field.name} field={field} control={control} />
        ))}
        {kind === 'kettle' ? <KettleFacts {...fields} setValue={setValue} /> : null}
      </div>
    </SendForm>
  );
}

function KettleFacts({
  control,
  register,
  setValue,
}: {
  control: Control<Draft>;
  register: UseFormRegister<Draft>;
  setValue: UseFormSetValue<Draft>;
}) {
  const source = useWatch({ control, name: 'facts.heatSource' }) as HeatSource | undefined;
  return (
    <>
      <SelectField label="Metal" {...register('facts.metal', { setValueAs: asChosen })}>
        <option value="">not said</option>
        {Object.entries(metalWords).map(([metal, words]) => (
          <option key={metal} value={metal}>
            {words}
          </option>
        ))}
      </SelectField>
      <Controller
        control={control}
        name="facts.hasLid"
        render={({ field: { value, onChange } }) => (
          <Segmented
            label="Has it a lid?"
            value={value === undefined ? '' : value ? 'yes' : 'no'}
            onChange={(next) => onChange(next === 'yes')}
            segments={[
              { value: 'yes', label: 'Yes' },
              { value: 'no', label: 'No' },
            ]}
          />
        )}
      />
      <div className="sm:col-span-2">
        <LevelRule level={3}>The heat</LevelRule>
      </div>
      <SelectField
        label="What heats it"
        {...register('facts.heatSource', {
          setValueAs: asChosen,
          onChange: ({ target }: { target: { value: string } }) => {
            if (target.value === '') return;
            setValue('facts.heaterEfficiency', proposedEfficiency(target.value as HeatSource), {
              shouldValidate: true,
            });
          },
        })}
      >
        <option value="">not said</option>
        {Object.entries(heatSourceWords).map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </SelectField>
      {heatFields.map((field) => (
        <Fact
          key={field.name}
          field={field.name === 'heaterEfficiency' ? { ...field, hint: efficiencyHint(source || undefined) } : field}
          control={control}
        />
      ))}
      <Fact field={learnedField} control={control} />
      {source === 'outdoorGasRing' || source === 'gasHob' ? (
        <div className="sm:col-span-2">
          <CautionMark mark={cautionWords.burner.mark}>{cautionWords.burner.text}</CautionMark>
        </div>
      ) : null}
    </>
  );
}

/** The first entry of a choice stands for "nobody has said". */
function asChosen(value: unknown): unknown {
  return value === '' ? undefined : value;
}

function Fact({ field, control }: { field: FactField; control: Control<Draft> }) {
  return (
    <Controller
      control={control}
      name={`facts.${field.name}`}
      render={({ field: { ref, name, value, onChange, onBlur }, fieldState }) => (
        <QuantityField
          ref={ref}
          name={name}
          kind={field.kind}
          label={field.label}
          hint={field.hint}
          value={value as number | undefined}
          onChange={onChange}
          onBlur={onBlur}
          error={wordsOf(fieldState.error, field)}
        />
      )}
    />
  );
}

function wordsOf(error: FieldError | undefined, { errorWords }: FactField): string | undefined {
  return error && (errorWords ?? error.message);
}
