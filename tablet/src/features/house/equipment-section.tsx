import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { createEquipmentSchema, equipmentSchema, type Equipment } from '@steepfall/shared/contracts';
import { formatMass, formatPressure, formatTemp, formatVolume } from '@steepfall/shared/units';
import { useForm, type Resolver } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { Segmented } from '#components/segmented.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { equipmentQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { SendForm } from './send-form.tsx';

type Kind = Equipment['kind'];

function factWords(item: Equipment): string {
  switch (item.kind) {
    case 'kettle':
      return [
        formatVolume(item.facts.volumeL, { unit: 'L' }),
        `${item.facts.heaterPowerW} W`,
        `${Math.round(item.facts.diameterM * 100)} cm wide`,
      ].join(' · ');
    case 'chiller':
      return [
        `${item.facts.metal} coil, ${item.facts.lengthM} m`,
        `water at ${formatTemp(item.facts.coolantC, { unit: 'C' })}`,
      ].join(' · ');
    case 'keg':
      return [
        formatVolume(item.facts.volumeL, { unit: 'L' }),
        `${formatMass(item.facts.tareG, { unit: 'g' })} empty`,
        `stamped ${formatPressure(item.facts.ratedKPa, { unit: 'kPa' })}`,
      ].join(' · ');
  }
}

export function EquipmentSection() {
  const may = useMay();
  const [isAdding, setIsAdding] = useState(false);
  const equipment = useQuery(equipmentQuery);
  const mayManage = may('equipment:manage');
  const add = mayManage ? <Button onClick={() => setIsAdding(true)}>Add equipment</Button> : null;
  return (
    <section aria-labelledby="equipment" className="grid gap-4">
      <LevelRule id="equipment" aside={add}>
        Equipment
      </LevelRule>
      {equipment.error ? (
        <Failed title="The equipment may be old" onRetry={() => void equipment.refetch()}>
          {failureWords(equipment.error)}
        </Failed>
      ) : null}
      {equipment.isPending ? <Waiting>Fetching the equipment.</Waiting> : null}
      {equipment.data?.length === 0 ? <EmptyState>A batch needs a kettle and a keg. Add them once.</EmptyState> : null}
      <ul>
        {(equipment.data ?? []).map((item) => (
          <li
            key={item.id}
            className="grid gap-x-8 border-b border-hair py-3 sm:grid-cols-[7rem_1fr_auto] sm:items-baseline"
          >
            <span className="text-body text-soft">{item.kind}</span>
            <span className="text-lead font-medium">{item.name}</span>
            <span className="text-body tabular-nums text-soft sm:text-right">{factWords(item)}</span>
          </li>
        ))}
      </ul>
      {isAdding ? <AddEquipmentDialog onClose={() => setIsAdding(false)} /> : null}
    </section>
  );
}

interface FactField {
  name: string;
  label: string;
  unit: string;
  hint?: string;
  usual: number;
}

const factFields: Record<Kind, FactField[]> = {
  kettle: [
    { name: 'volumeL', label: 'Volume to the brim', unit: 'L', usual: 30 },
    { name: 'diameterM', label: 'Width inside', unit: 'm', usual: 0.34 },
    { name: 'massKg', label: 'Mass of the empty kettle', unit: 'kg', usual: 3.5 },
    { name: 'heaterPowerW', label: 'Power of the heat', unit: 'W', usual: 3000 },
    {
      name: 'heaterEfficiency',
      label: 'Share of it that reaches the water',
      unit: '',
      hint: '0.1 to 1. An element in the water: near 1. A gas flame: near 0.4.',
      usual: 0.9,
    },
  ],
  chiller: [
    { name: 'lengthM', label: 'Length of the coil', unit: 'm', usual: 8 },
    { name: 'coolantC', label: 'Temperature of the water through it', unit: '°C', usual: 14 },
  ],
  keg: [
    { name: 'volumeL', label: 'Volume', unit: 'L', usual: 19 },
    { name: 'tareG', label: 'Mass when empty', unit: 'g', usual: 4200 },
    {
      name: 'ratedKPa',
      label: 'Pressure stamped on it',
      unit: 'kPa',
      hint: 'Gauge pressure. Read it from the keg, never guess.',
      usual: 900,
    },
  ],
};

const kinds: { value: Kind; label: string }[] = [
  { value: 'kettle', label: 'Kettle' },
  { value: 'chiller', label: 'Chiller' },
  { value: 'keg', label: 'Keg' },
];

/** What the form holds; the contract decides what of it is right. */
interface Draft {
  kind: Kind;
  name: string;
  facts: Record<string, number | string>;
}

function AddEquipmentDialog({ onClose }: { onClose: () => void }) {
  const [kind, setKind] = useState<Kind>('kettle');
  return (
    <Dialog isOpen onClose={onClose} title="Add equipment">
      <div className="grid gap-5">
        <Segmented label="What is it?" value={kind} onChange={setKind} segments={kinds} />
        <EquipmentForm key={kind} kind={kind} onClose={onClose} />
      </div>
    </Dialog>
  );
}

function EquipmentForm({ kind, onClose }: { kind: Kind; onClose: () => void }) {
  const client = useQueryClient();
  const { register, handleSubmit, setError, formState } = useForm<Draft>({
    resolver: zodResolver(createEquipmentSchema) as unknown as Resolver<Draft>,
    defaultValues: {
      kind,
      name: '',
      facts: {
        ...Object.fromEntries(factFields[kind].map(({ name, usual }) => [name, usual])),
        ...(kind === 'chiller' ? { metal: 'stainless' } : {}),
      },
    },
  });
  const add = useMutation({
    mutationFn: (body: Draft) => callHubFor(equipmentSchema, 'equipment', { method: 'POST', body }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: equipmentQuery.queryKey });
      onClose();
    },
    onError: (error) => {
      for (const { field, detail } of fieldProblems(error)) setError(field as 'name', { message: detail });
    },
  });
  const { errors } = formState;
  return (
    <SendForm
      onSubmit={(event) => void handleSubmit((body) => add.mutate(body))(event)}
      onClose={onClose}
      act="Add"
      busyLabel="Adding"
      isBusy={add.isPending}
      failedTitle="Nothing was added"
      error={add.isError && fieldProblems(add.error).length === 0 ? add.error : null}
    >
      <TextField label="Name" autoComplete="off" error={errors.name?.message} {...register('name')} />
      {kind === 'chiller' ? (
        <SelectField label="Metal of the coil" {...register('facts.metal')}>
          <option value="stainless">stainless steel</option>
          <option value="copper">copper</option>
        </SelectField>
      ) : null}
      {factFields[kind].map(({ name, label, unit, hint }) => (
        <TextField
          key={name}
          label={label}
          unit={unit}
          hint={hint}
          inputMode="decimal"
          error={errors.facts?.[name] ? 'A number that can be true of this.' : undefined}
          {...register(`facts.${name}`, { valueAsNumber: true })}
        />
      ))}
    </SendForm>
  );
}
