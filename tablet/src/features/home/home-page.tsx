import { useQuery } from '@tanstack/react-query';
import type { Batch, RunSummary } from '@steepfall/shared/contracts';
import { format } from 'date-fns';
import { ButtonLink } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { batchesQuery, runningRunsQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords, longDay } from '#lib/words.ts';
import { BookTeaser } from './book-teaser.tsx';
import { GuestHome } from './guest-home.tsx';
import { PlannedBatch } from './planned-batch.tsx';
import { Rehearse } from './rehearse.tsx';
import { RunningRun } from './running-run.tsx';

const LOOK_MS = 4_000;

export function HomePage() {
  const may = useMay();
  const { house } = useKnown();
  return (
    <Page title={longDay(new Date())} tabTitle="Today" above={house.name}>
      {may('runs:read') ? <Board /> : <GuestHome />}
    </Page>
  );
}

function newestFirst(a: Batch, b: Batch): number {
  return (b.run?.startedAtMs ?? 0) - (a.run?.startedAtMs ?? 0);
}

function Board() {
  const today = format(new Date(), 'yyyy-MM-dd');
  const may = useMay();
  const runs = useQuery({ ...runningRunsQuery, refetchInterval: LOOK_MS });
  const batches = useQuery({ ...batchesQuery, refetchInterval: 30_000 });
  const planned = (batches.data ?? [])
    .filter(({ status }) => status === 'planned')
    .sort((a, b) => a.plannedOn.localeCompare(b.plannedOn));
  const finished = (batches.data ?? []).filter(({ status }) => status === 'finished').sort(newestFirst);
  const failure = runs.error ?? batches.error;
  return (
    <>
      {failure ? (
        <Failed
          title="This may be old"
          onRetry={() => {
            void runs.refetch();
            void batches.refetch();
          }}
        >
          {failureWords(failure)}
        </Failed>
      ) : null}
      <Running runs={runs.data} />
      <section aria-labelledby="planned">
        <LevelRule id="planned">Planned</LevelRule>
        <div className="mt-5">
          {planned.length > 0 ? (
            <ul>
              {planned.map((batch) => (
                <PlannedBatch key={batch.id} batch={batch} today={today} />
              ))}
            </ul>
          ) : batches.data ? (
            <EmptyState action={<ButtonLink to="/recipes">Look at the recipes</ButtonLink>}>
              No batch is planned. A batch is planned from a recipe.
            </EmptyState>
          ) : batches.isPending ? (
            <Waiting>Asking the hub what is planned.</Waiting>
          ) : null}
        </div>
      </section>
      <div className="grid gap-x-14 gap-y-12 lg:grid-cols-2">
        {may('rehearsals:start') ? <Rehearse /> : null}
        <BookTeaser batch={finished[0]} />
      </div>
    </>
  );
}

function Running({ runs }: { runs: RunSummary[] | undefined }) {
  if (!runs || runs.length === 0) return null;
  return (
    <section aria-labelledby="running" className="grid gap-7">
      <LevelRule id="running">Running now</LevelRule>
      <div className="grid gap-14">
        {runs.map((run) => (
          <RunningRun key={run.id} run={run} />
        ))}
      </div>
    </section>
  );
}
