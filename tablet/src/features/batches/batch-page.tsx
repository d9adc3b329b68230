import type { ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Batch } from '@steepfall/shared/contracts';
import { formatVolume } from '@steepfall/shared/units';
import { useParams } from 'react-router-dom';
import { ButtonLink } from '#components/button.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { batchQuery } from '#lib/hub-queries.ts';
import { HubProblemError } from '#lib/http.ts';
import { useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { calendarDay, failureWords } from '#lib/words.ts';
import { BatchStatus } from './batch-status.tsx';
import { CancelledBatch, PlanSection } from './plan-section.tsx';
import { RunRecord } from './run-record.tsx';

interface BatchPageProps {
  /** The button that starts its run. */
  startRun: (batch: Batch) => ReactNode;
}

export function BatchPage({ startRun }: BatchPageProps) {
  const { batchId = '' } = useParams();
  const may = useMay();
  const units = useUnits();
  const batch = useQuery({ ...batchQuery(batchId), refetchInterval: 15_000 });
  if (!batch.data) {
    const isGone = batch.error instanceof HubProblemError && batch.error.problem.status === 404;
    return (
      <Page title={isGone ? 'No such batch' : 'Batch'}>
        {batch.error ? (
          <Failed title="The batch could not be fetched" onRetry={() => void batch.refetch()}>
            {failureWords(batch.error)}
          </Failed>
        ) : (
          <Waiting>Fetching the batch.</Waiting>
        )}
      </Page>
    );
  }
  const { batchNumber, recipeName, recipeId, revisionNumber, plannedOn, volumeL, status, run } = batch.data;
  return (
    <Page
      title={recipeName}
      tabTitle={`Batch ${batchNumber}`}
      above={
        <span className="flex flex-wrap items-center gap-x-5">
          <span className="font-medium text-text tabular-nums">batch {batchNumber}</span>
          <BatchStatus status={status} />
        </span>
      }
      lead={`${calendarDay(plannedOn)} · ${formatVolume(volumeL, { unit: units.volume })} · revision ${revisionNumber}`}
      action={
        <div className="flex flex-wrap items-center gap-3 print:hidden">
          {run?.status === 'running' && may('runs:read') ? (
            <ButtonLink look="primary" size="sheet" to={`/runs/${run.id}`}>
              Open the run sheet
            </ButtonLink>
          ) : status === 'planned' ? (
            startRun(batch.data)
          ) : null}
          {may('recipes:read') && recipeId ? (
            <ButtonLink look="quiet" to={`/recipes/${recipeId}`}>
              The recipe
            </ButtonLink>
          ) : null}
        </div>
      }
    >
      {run ? (
        <div className="grid gap-12 print:hidden">
          {may('runs:read') ? (
            <RunRecord run={run} kit={batch.data} />
          ) : (
            <p className="max-w-prose text-lead text-soft">How the day went is shown to those who brew.</p>
          )}
        </div>
      ) : null}
      {status === 'cancelled' ? <CancelledBatch batch={batch.data} /> : <PlanSection batch={batch.data} />}
    </Page>
  );
}
