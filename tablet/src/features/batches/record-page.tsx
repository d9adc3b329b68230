import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { ButtonLink } from '#components/button.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { runQuery } from '#lib/hub-queries.ts';
import { failureWords, longDay } from '#lib/words.ts';
import { RunRecord } from './run-record.tsx';

/** The record of one run: the way to a rehearsal's line, which is in no book. */
export function RecordPage() {
  const { runId = '' } = useParams();
  const run = useQuery({ ...runQuery(runId), refetchInterval: 15_000 });
  if (!run.data) {
    return (
      <Page title="Record">
        {run.error ? (
          <Failed title="The run could not be fetched" onRetry={() => void run.refetch()}>
            {failureWords(run.error)}
          </Failed>
        ) : (
          <Waiting>Fetching the run.</Waiting>
        )}
      </Page>
    );
  }
  const { id, title, isRehearsal, batchNumber, startedAtMs, status } = run.data;
  return (
    <Page
      title={title}
      tabTitle={`Record of ${title}`}
      above={
        isRehearsal ? (
          <StatusChip shape="dash">Rehearsal, not in the book</StatusChip>
        ) : (
          <span className="tabular-nums">batch {batchNumber}</span>
        )
      }
      lead={longDay(startedAtMs)}
      action={
        status === 'running' ? (
          <ButtonLink look="primary" size="sheet" to={`/runs/${id}`}>
            Open the run sheet
          </ButtonLink>
        ) : (
          <ButtonLink to="/">Go to today</ButtonLink>
        )
      }
    >
      <RunRecord run={run.data} />
    </Page>
  );
}
