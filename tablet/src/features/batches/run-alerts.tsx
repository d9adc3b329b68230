import { useMemo } from 'react';
import type { LogEntry, RunState } from '@steepfall/shared/runs';
import { LevelRule } from '#components/level-rule.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { alertRowsOf } from './run-account.ts';

const stageWords = { 'coming-up': 'coming up', 'stand-by': 'stand by', now: 'now', missed: 'late' } as const;

/** Each alert with its climb and how long it waited for a person. */
export function RunAlerts({ log, state }: { log: readonly LogEntry[]; state: RunState }) {
  const units = useUnits();
  const rows = useMemo(() => alertRowsOf(log, state, units), [log, state, units]);
  return (
    <section aria-labelledby="alerts" className="grid gap-4">
      <LevelRule id="alerts">Alerts</LevelRule>
      {rows.length === 0 ? (
        <p className="text-lead text-soft">No alert was raised.</p>
      ) : (
        <ul>
          {rows.map(({ id, verb, number, stages, outcome }) => (
            <li key={id} className="flex flex-wrap items-baseline gap-x-8 gap-y-1 border-b border-hair py-3">
              <p className="min-w-56 text-body font-medium">
                {verb}
                {number ? <span className="text-soft"> {number}</span> : null}
              </p>
              <ul aria-label="Stages" className="flex flex-1 flex-wrap gap-x-6 gap-y-1 text-body">
                {stages.map(({ stage, atMs }) => (
                  <li key={stage}>
                    <StatusChip
                      shape={stage === 'coming-up' ? 'ring' : stage === 'stand-by' ? 'dot' : 'diamond'}
                      tone={stage === 'now' || stage === 'missed' ? 'ember' : 'text'}
                    >
                      {stageWords[stage]} <span className="font-normal tabular-nums text-soft">{clockTime(atMs)}</span>
                    </StatusChip>
                  </li>
                ))}
              </ul>
              <p className="text-body text-soft">{outcome}</p>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
