import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  createProbeSchema,
  probeWithTokenSchema,
  type CreateProbe,
  type Probe,
  type ProbeWithToken,
} from '@steepfall/shared/contracts';
import { format } from 'date-fns';
import { useForm } from 'react-hook-form';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { probesQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { TokenDialog } from './token-dialog.tsx';
import { SendForm } from './send-form.tsx';

type Asked = { act: 'rotate' | 'revoke'; probe: Probe };

export function ProbesSection() {
  const may = useMay();
  const client = useQueryClient();
  const [isAdding, setIsAdding] = useState(false);
  const [asked, setAsked] = useState<Asked | null>(null);
  const [told, setTold] = useState<ProbeWithToken | null>(null);
  const probes = useQuery({ ...probesQuery, refetchInterval: 15_000 });
  const mayManage = may('probes:manage');
  const again = () => void client.invalidateQueries({ queryKey: probesQuery.queryKey });
  return (
    <section aria-labelledby="probes" className="grid gap-4">
      <LevelRule id="probes" aside={mayManage ? <Button onClick={() => setIsAdding(true)}>Add a probe</Button> : null}>
        Probes
      </LevelRule>
      {probes.error ? (
        <Failed title="The probes may be old" onRetry={() => void probes.refetch()}>
          {failureWords(probes.error)}
        </Failed>
      ) : null}
      {probes.isPending ? <Waiting>Fetching the probes.</Waiting> : null}
      {probes.data?.length === 0 ? (
        <EmptyState>
          Any thermometer that can make a web request is a probe. Add it here, and give it its token.
        </EmptyState>
      ) : null}
      <ul>
        {(probes.data ?? []).map((probe) => (
          <li key={probe.id} className="flex flex-wrap items-center gap-x-8 gap-y-1 border-b border-hair py-3">
            <div className="min-w-60 flex-1">
              <p className="text-lead font-medium">{probe.name}</p>
              <p className="text-body tabular-nums text-soft">
                {probe.isSimulated ? 'simulated · ' : ''}
                lag {probe.lagS} s · a reading every {probe.samplePeriodS} s · steps of {probe.resolutionC} °C
              </p>
            </div>
            <ProbeState probe={probe} />
            {mayManage && !probe.isSimulated ? (
              <Menu
                label={
                  <>
                    Token<span className="sr-only"> of {probe.name}</span>
                  </>
                }
                choices={[
                  { label: 'Make a new token', onChoose: () => setAsked({ act: 'rotate', probe }) },
                  {
                    label: 'Take the token away',
                    isDanger: true,
                    isDisabled: probe.isRevoked,
                    onChoose: () => setAsked({ act: 'revoke', probe }),
                  },
                ]}
              />
            ) : null}
          </li>
        ))}
      </ul>
      {isAdding ? (
        <AddProbeDialog
          onClose={() => setIsAdding(false)}
          onAdded={(made) => {
            setIsAdding(false);
            setTold(made);
            again();
          }}
        />
      ) : null}
      {asked ? (
        <TokenActDialog
          {...asked}
          onClose={() => setAsked(null)}
          onDone={(made) => {
            setAsked(null);
            setTold(made);
            again();
          }}
        />
      ) : null}
      {told ? <TokenDialog made={told} onClose={() => setTold(null)} /> : null}
    </section>
  );
}

function ProbeState({ probe: { isRevoked, lastReadingAtMs } }: { probe: Probe }) {
  if (isRevoked) {
    return (
      <StatusChip shape="diamond" tone="ember">
        shut out
      </StatusChip>
    );
  }
  if (lastReadingAtMs === null) {
    return (
      <StatusChip shape="ring" tone="soft">
        never heard
      </StatusChip>
    );
  }
  return (
    <StatusChip shape="dot" className="tabular-nums">
      last heard {format(lastReadingAtMs, 'd MMM, HH:mm')}
    </StatusChip>
  );
}

const actWords = {
  rotate: {
    title: 'Make a new token?',
    tells: 'The old token stops working at once. The probe sends again when it has the new one.',
    button: 'Make a new token',
    failed: 'The token was not changed',
  },
  revoke: {
    title: 'Take the token away?',
    tells: 'The probe is shut out at once. What it has sent so far is kept. A new token lets it in again.',
    button: 'Take it away',
    failed: 'The token still works',
  },
} as const;

function TokenActDialog({
  act,
  probe,
  onClose,
  onDone,
}: Asked & { onClose: () => void; onDone: (made: ProbeWithToken | null) => void }) {
  const { title, tells, button, failed } = actWords[act];
  const run = useMutation({
    mutationFn: async () => {
      if (act === 'rotate') return callHubFor(probeWithTokenSchema, `probes/${probe.id}/token`, { method: 'POST' });
      await callHub(`probes/${probe.id}/token`, { method: 'DELETE' });
      return null;
    },
    onSuccess: onDone,
  });
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button
            look={act === 'revoke' ? 'danger' : 'primary'}
            onClick={() => run.mutate()}
            isBusy={run.isPending}
            busyLabel="Telling the hub"
          >
            {button}
          </Button>
          <Button onClick={onClose}>Leave it</Button>
        </>
      }
    >
      <p className="font-medium">{probe.name}</p>
      <p className="mt-2">{tells}</p>
      {run.isError ? (
        <div className="mt-5">
          <Banner tone="act" title={failed}>
            {failureWords(run.error)}
          </Banner>
        </div>
      ) : null}
    </Dialog>
  );
}

const probeFields = [
  {
    name: 'lagS',
    label: 'Lag in stirred water',
    unit: 's',
    hint: 'As its maker tells, or as you measured it. A steel finger: near 8.',
  },
  { name: 'resolutionC', label: 'Smallest step it shows', unit: '°C', hint: undefined },
  { name: 'samplePeriodS', label: 'Time between two readings', unit: 's', hint: undefined },
] as const;

function AddProbeDialog({ onClose, onAdded }: { onClose: () => void; onAdded: (made: ProbeWithToken) => void }) {
  const { register, handleSubmit, setError, formState } = useForm<CreateProbe>({
    resolver: zodResolver(createProbeSchema),
    defaultValues: { name: '', lagS: 8, resolutionC: 0.1, samplePeriodS: 1 },
  });
  const add = useMutation({
    mutationFn: (body: CreateProbe) => callHubFor(probeWithTokenSchema, 'probes', { method: 'POST', body }),
    onSuccess: onAdded,
    onError: (error) => {
      for (const { field, detail } of fieldProblems(error)) setError(field as keyof CreateProbe, { message: detail });
    },
  });
  const { errors } = formState;
  return (
    <Dialog isOpen onClose={onClose} title="Add a probe">
      <SendForm
        onSubmit={(event) => void handleSubmit((body) => add.mutate(body))(event)}
        onClose={onClose}
        act="Add"
        busyLabel="Adding"
        isBusy={add.isPending}
        failedTitle="The probe was not added"
        error={add.isError && fieldProblems(add.error).length === 0 ? add.error : null}
      >
        <TextField
          label="Name"
          hint="Where it hangs: kettle, fridge."
          autoComplete="off"
          error={errors.name?.message}
          {...register('name')}
        />
        {probeFields.map(({ name, label, unit, hint }) => (
          <TextField
            key={name}
            label={label}
            unit={unit}
            hint={hint}
            inputMode="decimal"
            error={errors[name] ? 'A number that can be true of this.' : undefined}
            {...register(name, { valueAsNumber: true })}
          />
        ))}
      </SendForm>
    </Dialog>
  );
}
