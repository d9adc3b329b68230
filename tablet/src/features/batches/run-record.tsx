import { lazy, Suspense, useId, useMemo, useState, type ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Member, RunSummary } from '@steepfall/shared/contracts';
import { foldRun, type Conflict, type RunState } from '@steepfall/shared/runs';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { Segmented } from '#components/segmented.tsx';
import { membersQuery, runLogQuery, runReadingsQuery, type StoredEntry } from '#lib/hub-queries.ts';
import { linePoints, stretchesOf } from '#lib/liquid-line.ts';
import { useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { clockTime, failureWords } from '#lib/words.ts';
import { Account } from './account.tsx';
import { FiguresAccount } from './figures-account.tsx';
import { Learned } from './learned.tsx';
import type { BatchKit } from './learned-save.ts';
import { LineTable } from './line-table.tsx';
import { flagsOf, inOrder, levelsOf, windowsOf, type Span, type Window } from './record-view.ts';
import { summaryOf } from './run-account.ts';
import { RunAlerts } from './run-alerts.tsx';
import { RunLog } from './run-log.tsx';

const Curve = lazy(() => import('./curve.tsx').then((module) => ({ default: module.Curve })));

const BUCKETS = 900;
const noEntries: StoredEntry[] = [];
const noMembers: Member[] = [];

/** A run to look at afterwards: its line, what was planned and what came, its alerts, its log. */
export function RunRecord({ run, kit = null }: { run: RunSummary; kit?: BatchKit | null }) {
  const may = useMay();
  const isOver = run.status === 'ended';
  const refetchInterval = isOver ? (false as const) : 10_000;
  const log = useQuery({ ...runLogQuery(run.id), refetchInterval });
  const members = useQuery({ ...membersQuery, enabled: may('members:read') });
  const entries = useMemo(() => inOrder(log.data ?? noEntries), [log.data]);
  const state = useMemo(() => foldRun(entries), [entries]);
  if (log.error && !log.data) {
    return (
      <Failed title="The log of this run could not be fetched" onRetry={() => void log.refetch()}>
        {failureWords(log.error)}
      </Failed>
    );
  }
  if (!log.data) return <Waiting>Fetching the record.</Waiting>;
  return (
    <>
      <Conflicts conflicts={state.conflicts} state={state} />
      <Line run={run} state={state} refetchInterval={refetchInterval} />
      <FiguresAccount run={run} state={state} />
      <Account state={state} members={members.data ?? noMembers} />
      <RunAlerts log={entries} state={state} />
      <Learned run={run} kit={kit} />
      <Section id="log" title="The log">
        <RunLog log={entries} state={state} flags={flagsOf(state)} members={members.data ?? noMembers} />
      </Section>
    </>
  );
}

function Section({ id, title, children }: { id: string; title: string; children: ReactNode }) {
  return (
    <section aria-labelledby={id} className="grid min-w-0 gap-6">
      <LevelRule id={id}>{title}</LevelRule>
      {children}
    </section>
  );
}

const conflictWords: Record<Conflict['kind'], (title: string) => string> = {
  'step-done-twice': (title) => `Two people say they did "${title}". The first counts; both are in the log.`,
  'started-twice': () => 'The run was started twice. The first start counts.',
  'ended-twice': () => 'The run was ended twice. The first end counts.',
  'after-end': (title) =>
    `Something was written after the run had ended${title ? `, about "${title}"` : ''}. It is kept.`,
};

function Conflicts({ conflicts, state }: { conflicts: readonly Conflict[]; state: RunState }) {
  if (conflicts.length === 0) return null;
  return (
    <Banner title={conflicts.length === 1 ? 'One thing does not add up' : `${conflicts.length} things do not add up`}>
      <ul>
        {conflicts.map(({ kind, stepId, eventIds }) => (
          <li key={eventIds.join()}>
            {conflictWords[kind](state.steps.find(({ step }) => step.id === stepId)?.step.title ?? '')}
          </li>
        ))}
      </ul>
    </Banner>
  );
}

const windowWords: Record<Window, string> = { whole: 'All of it', steep: 'The steep', fall: 'The fall' };

function Line({ run, state, refetchInterval }: { run: RunSummary; state: RunState; refetchInterval: number | false }) {
  const summaryId = useId();
  const units = useUnits();
  const [window, setWindow] = useState<Window>('whole');
  const [isTable, setIsTable] = useState(false);
  const windows = useMemo(() => windowsOf(state), [state]);
  const whole = useQuery({ ...runReadingsQuery(run.id, { buckets: BUCKETS }), refetchInterval });
  const span: Span | null = window === 'whole' ? null : windows[window];
  const close = useQuery({
    ...runReadingsQuery(run.id, {
      fromMs: Math.round(span?.fromMs ?? 0),
      toMs: Math.round(span?.toMs ?? 0),
      buckets: BUCKETS,
    }),
    enabled: span !== null,
  });
  const wholeLine = useMemo(() => linePoints(whole.data?.readings ?? []), [whole.data]);
  const stretches = useMemo(() => stretchesOf(wholeLine), [wholeLine]);
  const closeLine = useMemo(() => linePoints(close.data?.readings ?? []), [close.data]);
  const line = span && closeLine.length > 1 ? closeLine : wholeLine;
  const flags = useMemo(() => flagsOf(state), [state]);
  const levels = useMemo(() => levelsOf(state), [state]);
  const choices = (['whole', 'steep', 'fall'] as const)
    .filter((value) => value === 'whole' || windows[value] !== null)
    .map((value) => ({ value, label: windowWords[value] }));
  const first = line[0];
  const last = line.at(-1);
  const shown = span ?? (first && last ? { fromMs: first.atMs, toMs: last.atMs } : null);
  const inSpan = useMemo(
    () => (span ? flags.filter(({ atMs }) => atMs >= span.fromMs && atMs <= span.toMs) : flags),
    [flags, span],
  );
  return (
    <Section id="line" title="The line">
      <p id={summaryId} className="max-w-[60ch] text-lead">
        {whole.data ? summaryOf(state, wholeLine, units) : 'The readings are on their way.'}
      </p>
      {whole.error && !whole.data ? (
        <Failed title="The readings could not be fetched" onRetry={() => void whole.refetch()}>
          {failureWords(whole.error)}
        </Failed>
      ) : null}
      {shown && line.length > 1 ? (
        <>
          <div className="flex flex-wrap items-end justify-between gap-4">
            {choices.length > 1 ? (
              <Segmented label="Look at" isLabelHidden value={window} onChange={setWindow} segments={choices} />
            ) : null}
            <Button aria-pressed={isTable} onClick={() => setIsTable(!isTable)}>
              {isTable ? 'Show as a drawing' : 'Show as a table'}
            </Button>
          </div>
          {isTable ? (
            <LineTable line={line} flags={inSpan} startedAtMs={state.startedAtMs ?? run.startedAtMs} />
          ) : (
            <figure
              aria-label={`Temperature of the liquid from ${clockTime(shown.fromMs)} to ${clockTime(shown.toMs)}`}
              aria-describedby={summaryId}
              className="min-w-0"
            >
              <Suspense fallback={<div className="h-[26rem] sm:h-[32rem]" />}>
                <Curve
                  line={line}
                  stretches={stretches}
                  levels={levels}
                  flags={flags}
                  {...shown}
                  isClose={span !== null}
                />
              </Suspense>
              <figcaption className="mt-3 text-note text-soft">
                <Key />
              </figcaption>
            </figure>
          )}
        </>
      ) : null}
    </Section>
  );
}

function Key() {
  return (
    <span className="flex flex-wrap gap-x-6 gap-y-1">
      <span className="text-copper">climbing</span>
      <span className="text-leaf">holding</span>
      <span className="text-tarn">falling</span>
      <span>The numbers on the flags are those in the log. The same numbers stand in the table.</span>
    </span>
  );
}
