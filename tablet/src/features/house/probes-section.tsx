import { useState } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { probeWithTokenSchema, type Probe, type ProbeWithToken } from '@steepfall/shared/contracts';
import { correctedTempC } from '@steepfall/shared/figures';
import { calibrationOf } from '@steepfall/shared/readings';
import {
  formatTemp,
  kelvinToFahrenheitDegrees,
  MINUS,
  NO_BREAK_SPACE,
  type UnitPreferences,
} from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { probesQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import { quantityOf, quantityText, useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { CalibrationDialog } from './calibration-dialog.tsx';
import { LagTestDialog } from './lag-test-dialog.tsx';
import { AddProbeDialog, EditProbeDialog } from './probe-dialog.tsx';
import { TokenDialog } from './token-dialog.tsx';
import { patchProbe } from './use-save-probe.ts';

type Asked = { act: 'rotate' | 'revoke'; probe: Probe };
type Opened = { dialog: 'edit' | 'lag' | 'calibration'; probe: Probe };

export function ProbesSection() {
  const may = useMay();
  const client = useQueryClient();
  const [isAdding, setIsAdding] = useState(false);
  const [asked, setAsked] = useState<Asked | null>(null);
  const [told, setTold] = useState<ProbeWithToken | null>(null);
  const probes = useQuery({ ...probesQuery, refetchInterval: 15_000 });
  const [opened, setOpened] = useState<Opened | null>(null);
  const units = useUnits();
  const clear = useClearCalibration();
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
      {clear.isError ? (
        <Banner tone="act" title="The calibration was kept">
          {failureWords(clear.error)}
        </Banner>
      ) : null}
      {probes.isPending ? <Waiting>Fetching the probes.</Waiting> : null}
      {probes.data?.length === 0 ? (
        <EmptyState>
          Any thermometer that can make a web request is a probe. Add it here, and give it its token. Then test how late
          it is and calibrate it: the moment the hops go in depends on both.
        </EmptyState>
      ) : null}
      <ul>
        {(probes.data ?? []).map((probe) => (
          <li
            key={probe.id}
            className="grid grid-cols-[1fr_auto] items-center gap-x-6 border-b border-hair py-3 xl:grid-cols-[1fr_auto_auto]"
          >
            <p className="text-lead font-medium">{probe.name}</p>
            <div className="col-span-2 text-body tabular-nums text-soft xl:col-span-1 xl:col-start-1">
              <p>{probeWords(probe, units)}</p>
              <p>{calibrationWords(probe, units.temperature)}</p>
            </div>
            <div className="col-span-2 pt-1 xl:col-span-1 xl:col-start-2 xl:row-span-2 xl:row-start-1 xl:pt-0">
              <ProbeState probe={probe} />
            </div>
            {mayManage ? (
              <div className="col-start-2 row-start-1 xl:col-start-3 xl:row-span-2 xl:row-start-1">
                <Menu
                  label={
                    <>
                      Change<span className="sr-only"> {probe.name}</span>
                    </>
                  }
                  choices={[
                    { label: 'Edit', onChoose: () => setOpened({ dialog: 'edit', probe }) },
                    { label: 'Test the lag', onChoose: () => setOpened({ dialog: 'lag', probe }) },
                    { label: 'Calibrate', onChoose: () => setOpened({ dialog: 'calibration', probe }) },
                    ...(probe.calibration
                      ? [{ label: 'Forget the calibration', onChoose: () => clear.mutate(probe) }]
                      : []),
                    { label: 'Make a new token', onChoose: () => setAsked({ act: 'rotate', probe }) },
                    {
                      label: 'Take the token away',
                      isDanger: true,
                      isDisabled: probe.isRevoked,
                      onChoose: () => setAsked({ act: 'revoke', probe }),
                    },
                  ]}
                />
              </div>
            ) : null}
          </li>
        ))}
      </ul>
      {opened?.dialog === 'edit' ? <EditProbeDialog probe={opened.probe} onClose={() => setOpened(null)} /> : null}
      {opened?.dialog === 'lag' ? <LagTestDialog probe={opened.probe} onClose={() => setOpened(null)} /> : null}
      {opened?.dialog === 'calibration' ? (
        <CalibrationDialog probe={opened.probe} onClose={() => setOpened(null)} />
      ) : null}
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

function useClearCalibration() {
  const client = useQueryClient();
  const again = () => client.invalidateQueries({ queryKey: probesQuery.queryKey });
  return useMutation({
    mutationFn: (probe: Probe) => patchProbe(probe, { calibration: null }),
    onSuccess: (bare, { name, calibration }) => {
      void again();
      offerUndo(`${name} is not calibrated any more.`, async () => {
        await patchProbe(bare, { calibration });
        await again();
      });
    },
  });
}

function probeWords({ lagS, samplePeriodS, resolutionC }: Probe, units: UnitPreferences): string {
  const step = quantityOf('kelvin', units);
  return `lag ${lagS} s · a reading every ${samplePeriodS} s · steps of ${quantityText(resolutionC, step)}${NO_BREAK_SPACE}${step.symbol}`;
}

const LOOKED_AT_C = 80;

/** "calibrated 3 May: 0.4 °C more near the steep". */
function calibrationWords({ calibration, calibratedAtMs }: Probe, unit: UnitPreferences['temperature']): string {
  const verdict = calibration && calibrationOf(calibration);
  if (verdict?.kind !== 'accepted' || calibratedAtMs === null) return 'not calibrated';
  const offK = correctedTempC(LOOKED_AT_C, verdict.correction) - LOOKED_AT_C;
  const off = (unit === 'F' ? kelvinToFahrenheitDegrees(offK) : offK).toFixed(1);
  const at = formatTemp(LOOKED_AT_C, { unit, digits: 0 });
  return `calibrated ${format(calibratedAtMs, 'd MMM yyyy')} · ${Number(off) < 0 ? off.replace('-', MINUS) : `+${off}`}${NO_BREAK_SPACE}°${unit} at ${at}`;
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
