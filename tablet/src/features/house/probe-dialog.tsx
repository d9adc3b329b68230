import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation } from '@tanstack/react-query';
import {
  createProbeSchema,
  probeWithTokenSchema,
  type CreateProbe,
  type Probe,
  type ProbeWithToken,
} from '@steepfall/shared/contracts';
import { Controller, useForm, type UseFormReturn } from 'react-hook-form';
import { Dialog } from '#components/dialog.tsx';
import { TextField } from '#components/field.tsx';
import { QuantityField } from '#components/quantity-field.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { plainQuantity, type Quantity, type QuantityKind } from '#lib/units.ts';
import { fieldProblems } from '#lib/words.ts';
import { SendForm } from '#components/send-form.tsx';
import { useSaveProbe } from './use-save-probe.ts';

const probeFields: {
  name: 'lagS' | 'resolutionC' | 'samplePeriodS';
  label: string;
  kind: QuantityKind | Quantity;
  hint?: string;
  errorWords: string;
}[] = [
  {
    name: 'lagS',
    label: 'Lag in stirred water',
    kind: plainQuantity('s'),
    hint: 'As its maker tells, or found by the test of the lag. A steel finger: near 8.',
    errorWords: 'A time from 0 to 120 s.',
  },
  {
    name: 'resolutionC',
    label: 'Smallest step it shows',
    kind: 'kelvin',
    errorWords: 'A step above 0, about a degree at most.',
  },
  {
    name: 'samplePeriodS',
    label: 'Time between two readings',
    kind: plainQuantity('s'),
    errorWords: 'A time from 0.1 to 60 s.',
  },
];

function ProbeFields({ form }: { form: UseFormReturn<CreateProbe> }) {
  return (
    <>
      <TextField
        label="Name"
        hint="Where it hangs: kettle, fridge."
        autoComplete="off"
        error={form.formState.errors.name?.message}
        {...form.register('name')}
      />
      {probeFields.map(({ name, label, kind, hint, errorWords }) => (
        <Controller
          key={name}
          control={form.control}
          name={name}
          render={({ field, fieldState }) => (
            <QuantityField
              {...field}
              kind={kind}
              label={label}
              hint={hint}
              error={fieldState.error ? errorWords : undefined}
            />
          )}
        />
      ))}
    </>
  );
}

function useProbeForm(defaultValues: CreateProbe) {
  const form = useForm<CreateProbe>({ resolver: zodResolver(createProbeSchema), defaultValues });
  const showProblems = (error: Error) => {
    for (const { field, detail } of fieldProblems(error))
      form.setError(field as keyof CreateProbe, { message: detail });
  };
  return { form, showProblems };
}

export function AddProbeDialog({ onClose, onAdded }: { onClose: () => void; onAdded: (made: ProbeWithToken) => void }) {
  const { form, showProblems } = useProbeForm({ name: '', lagS: 8, resolutionC: 0.1, samplePeriodS: 1 });
  const add = useMutation({
    mutationFn: (body: CreateProbe) => callHubFor(probeWithTokenSchema, 'probes', { method: 'POST', body }),
    onSuccess: onAdded,
    onError: showProblems,
  });
  return (
    <Dialog isOpen onClose={onClose} title="Add a probe">
      <SendForm
        onSubmit={(event) => void form.handleSubmit((body) => add.mutate(body))(event)}
        onClose={onClose}
        act="Add"
        busyLabel="Adding"
        isBusy={add.isPending}
        failedTitle="The probe was not added"
        error={add.isError && fieldProblems(add.error).length === 0 ? add.error : null}
      >
        <ProbeFields form={form} />
      </SendForm>
    </Dialog>
  );
}

export function EditProbeDialog({ probe, onClose }: { probe: Probe; onClose: () => void }) {
  const { name, lagS, resolutionC, samplePeriodS } = probe;
  const { form, showProblems } = useProbeForm({ name, lagS, resolutionC, samplePeriodS });
  const save = useSaveProbe(probe);
  return (
    <Dialog isOpen onClose={onClose} title={name}>
      <SendForm
        onSubmit={(event) =>
          void form.handleSubmit((body) => save.mutate(body, { onSuccess: onClose, onError: showProblems }))(event)
        }
        onClose={onClose}
        act="Save"
        busyLabel="Saving"
        isBusy={save.isPending}
        failedTitle="It was not saved"
        error={save.isError && fieldProblems(save.error).length === 0 ? save.error : null}
      >
        <ProbeFields form={form} />
      </SendForm>
    </Dialog>
  );
}
