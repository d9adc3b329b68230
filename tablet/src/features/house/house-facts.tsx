import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { houseSchema, updateHouseSchema, type House, type UpdateHouse } from '@steepfall/shared/contracts';
import { boilingPointAtAltitudeC } from '@steepfall/shared/figures';
import { formatTemp } from '@steepfall/shared/units';
import { useForm } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { houseQuery } from '#lib/hub-queries.ts';
import { noteHouse, useKnown, useMay } from '#lib/session.ts';
import { useVersion } from '#lib/save-at-version.ts';
import { useUnits } from '#lib/units.ts';
import { SendForm } from '#components/send-form.tsx';

/** Name and altitude. The altitude sets the gas pressure and the boiling point. */
export function HouseFacts() {
  const known = useKnown();
  const may = useMay();
  const { temperature } = useUnits();
  const [isOpen, setIsOpen] = useState(false);
  const { data: house = known.house } = useQuery(houseQuery);
  return (
    <section aria-labelledby="facts" className="grid gap-4">
      <LevelRule
        id="facts"
        aside={may('house:manage') ? <Button onClick={() => setIsOpen(true)}>Change</Button> : null}
      >
        The place
      </LevelRule>
      <p className="text-lead">
        {house.altitudeM} m above the sea: water boils at{' '}
        {formatTemp(boilingPointAtAltitudeC(house.altitudeM), { unit: temperature })}.{' '}
        <span className="text-soft">Gas pressures and the boiling point are computed for that height.</span>
      </p>
      <p className="text-lead">
        Money in {house.currency}. <span className="text-soft">Prices in the stores and the cost of a batch.</span>
      </p>
      {isOpen ? <HouseDialog house={house} onClose={() => setIsOpen(false)} /> : null}
    </section>
  );
}

function HouseDialog({ house, onClose }: { house: House; onClose: () => void }) {
  const client = useQueryClient();
  const { register, handleSubmit, formState } = useForm<UpdateHouse>({
    resolver: zodResolver(updateHouseSchema),
    defaultValues: {
      name: house.name,
      altitudeM: house.altitudeM,
      currency: house.currency,
      version: house.version,
    },
  });
  const { version, meet } = useVersion(house.version);
  const save = useMutation({
    mutationFn: (body: UpdateHouse) =>
      callHubFor(houseSchema, 'house', { method: 'PATCH', body: { ...body, version } }),
    onSuccess: (saved) => {
      client.setQueryData(houseQuery.queryKey, saved);
      noteHouse(saved);
      onClose();
    },
    onError: (error) => meet(error, async () => (await client.fetchQuery({ ...houseQuery, staleTime: 0 })).version),
  });
  return (
    <Dialog isOpen onClose={onClose} title="The place">
      <SendForm
        onSubmit={(event) => void handleSubmit((body) => save.mutate(body))(event)}
        onClose={onClose}
        act="Save"
        busyLabel="Saving"
        isBusy={save.isPending}
        failedTitle="It was not saved"
        error={save.error}
      >
        <TextField label="Name of the house" error={formState.errors.name?.message} {...register('name')} />
        <TextField
          label="Height above the sea"
          inputMode="numeric"
          unit="m"
          error={formState.errors.altitudeM ? 'A number from −430 to 6000.' : undefined}
          {...register('altitudeM', { valueAsNumber: true })}
        />
        <TextField
          label="Money"
          hint="Prices and costs are in it. Three letters: EUR, USD, GBP."
          autoComplete="off"
          autoCapitalize="characters"
          maxLength={3}
          error={formState.errors.currency?.message}
          {...register('currency', { setValueAs: (text: string) => text.trim().toUpperCase() })}
        />
      </SendForm>
    </Dialog>
  );
}
