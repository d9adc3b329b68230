import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import { alertAccount, type LogEntry, type RunState } from '@steepfall/shared/runs';
import { LevelRule } from '#components/level-rule.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { membersQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { accountLines, alertRowsOf, countText, type AlertRow } from './alert-rows.ts';

/** What called during the run, in numbers; then each alert with its climb and what came of it, faults by themselves. */
export function RunAlerts({ log, state }: { log: readonly LogEntry[]; state: RunState }) {
  const units = useUnits();
  const may = useMay();
  const members = useQuery({ ...membersQuery, enabled: may('members:read') });
  const account = useMemo(() => alertAccount(log, state), [log, state]);
  const rows = useMemo(() => alertRowsOf(log, state, account, units), [log, state, account, units]);
  const nameOf = (memberId: string | null) =>
    memberId === null ? 'the watch' : (members.data?.find(({ id }) => id === memberId)?.displayName ?? 'somebody');
  const faults = rows.filter(({ isFault }) => isFault);
  return (
    <section aria-labelledby="alerts" className="grid gap-4">
      <LevelRule id="alerts">Alerts</LevelRule>
      {rows.length === 0 ? (
        <p className="text-lead text-soft">No alert was raised.</p>
      ) : (
        <>
          <div className="grid gap-1">
            <p className="text-lead tabular-nums">{countText(account)}</p>
            {accountLines(account, nameOf).map((line) => (
              <p key={line} className="text-body text-soft tabular-nums">
                {line}
              </p>
            ))}
          </div>
          <AlertRows label="What the sheet called for" rows={rows.filter(({ isFault }) => !isFault)} />
          {faults.length > 0 ? <AlertRows label="Faults" isTitled rows={faults} /> : null}
        </>
      )}
    </section>
  );
}

function AlertRows({ label, isTitled, rows }: { label: string; isTitled?: boolean; rows: readonly AlertRow[] }) {
  return (
    <>
      {isTitled ? <h3 className="mt-2 text-lead font-medium">{label}</h3> : null}
      <ul aria-label={label}>
        {rows.map(({ id, isFault, verb, number, stages, outcome }) => (
          <li key={id} className="flex flex-wrap items-baseline gap-x-8 gap-y-1 border-b border-hair py-3">
            <p className="min-w-56 text-body font-medium">
              {verb}
              {number ? <span className="text-soft"> {number}</span> : null}
            </p>
            <ul aria-label="Stages" className="flex flex-1 flex-wrap gap-x-6 gap-y-1 text-body">
              {stages.map(({ word, isLoud, atMs }) => (
                <li key={`${word}-${atMs}`}>
                  <StatusChip shape={shapeOf(isFault, word)} tone={isLoud ? 'ember' : 'text'}>
                    {word} <span className="font-normal tabular-nums text-soft">{clockTime(atMs)}</span>
                  </StatusChip>
                </li>
              ))}
            </ul>
            <p className="text-body text-soft">{outcome}</p>
          </li>
        ))}
      </ul>
    </>
  );
}

function shapeOf(isFault: boolean, word: string): 'broken' | 'ring' | 'dot' | 'diamond' {
  if (isFault) return 'broken';
  if (word === 'coming up') return 'ring';
  return word === 'stand by' ? 'dot' : 'diamond';
}
