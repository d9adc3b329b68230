import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { batchSchema, type Batch } from '@steepfall/shared/contracts';
import { useState } from 'react';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { SheetSteps } from '#components/sheet-steps.tsx';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { batchPlanQuery, batchQuery, storesQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import { failureWords } from '#lib/words.ts';
import { SheetEditor } from './sheet-editor.tsx';
import { BatchCost, WeighOut } from './weigh-out.tsx';

/** What a batch was planned with: before its run to be weighed and changed, afterwards to be looked up. */
export function PlanSection({ batch }: { batch: Batch }) {
  const may = useMay();
  const plan = useQuery(batchPlanQuery(batch.id));
  const [isEditing, setIsEditing] = useState(false);
  if (!plan.data) {
    return plan.error ? (
      <Failed title="The plan could not be fetched" onRetry={() => void plan.refetch()}>
        {failureWords(plan.error)}
      </Failed>
    ) : (
      <Waiting>Fetching the plan.</Waiting>
    );
  }
  const { weighOut, sheet } = plan.data;
  const isPlanned = batch.status === 'planned';
  const mayChange = isPlanned && may('batches:manage');
  return (
    <>
      <div className="grid gap-x-14 gap-y-12 xl:grid-cols-[1.6fr_1fr]">
        <WeighOut batch={batch} lines={weighOut} />
        <BatchCost batch={batch} lines={weighOut} />
      </div>
      {isPlanned ? (
        <section aria-labelledby="sheet" className="grid min-w-0 gap-5 print:hidden">
          <LevelRule
            id="sheet"
            aside={
              mayChange && !isEditing ? (
                <Button onClick={() => setIsEditing(true)}>
                  Change<span className="sr-only"> the run sheet</span>
                </Button>
              ) : null
            }
          >
            The run sheet
          </LevelRule>
          {isEditing && mayChange ? (
            <SheetEditor plan={plan.data} onClose={() => setIsEditing(false)} />
          ) : (
            <SheetSteps sheet={sheet} />
          )}
        </section>
      ) : null}
      {mayChange ? <CancelBatch batch={batch} /> : null}
    </>
  );
}

function useBatchesAgain() {
  const client = useQueryClient();
  return () =>
    Promise.all([
      client.invalidateQueries({ queryKey: ['batches'] }),
      client.invalidateQueries({ queryKey: storesQuery.queryKey }),
    ]);
}

const restoreBatch = (id: string) => callHubFor(batchSchema, `batches/${id}/restore`, { method: 'POST' });

function CancelBatch({ batch: { id, batchNumber } }: { batch: Batch }) {
  const again = useBatchesAgain();
  const [isAsking, setIsAsking] = useState(false);
  const cancel = useMutation({
    mutationFn: () => callHub(`batches/${id}`, { method: 'DELETE' }),
    onSuccess: async () => {
      setIsAsking(false);
      offerUndo(`Batch ${batchNumber} cancelled.`, () => restoreBatch(id).then(again));
      await again();
    },
  });
  return (
    <div className="print:hidden">
      <Button look="danger" onClick={() => setIsAsking(true)}>
        Cancel the batch
      </Button>
      <Dialog
        isOpen={isAsking}
        onClose={() => setIsAsking(false)}
        title="Cancel the batch?"
        actions={
          <>
            <Button look="danger" onClick={() => cancel.mutate()} isBusy={cancel.isPending} busyLabel="Cancelling it">
              Cancel the batch
            </Button>
            <Button onClick={() => setIsAsking(false)}>Leave it</Button>
          </>
        }
      >
        <p>
          Batch {batchNumber} leaves the board and the book, and what it set aside is free again. It can be brought
          back.
        </p>
        {cancel.error ? (
          <div className="mt-5">
            <Banner tone="act" title="The batch is still planned">
              {failureWords(cancel.error)}
            </Banner>
          </div>
        ) : null}
      </Dialog>
    </div>
  );
}

/** A batch that was cancelled is not gone: it keeps its number, and can come back. */
export function CancelledBatch({ batch: { id } }: { batch: Batch }) {
  const may = useMay();
  const client = useQueryClient();
  const again = useBatchesAgain();
  const restore = useMutation({
    mutationFn: () => restoreBatch(id),
    onSuccess: async (batch) => {
      client.setQueryData(batchQuery(id).queryKey, batch);
      await again();
    },
  });
  return (
    <div className="grid gap-5">
      <EmptyState
        action={
          may('batches:manage') ? (
            <Button isBusy={restore.isPending} busyLabel="Bringing it back" onClick={() => restore.mutate()}>
              Bring it back
            </Button>
          ) : null
        }
      >
        This batch was cancelled. What it had set aside is free again; brought back, it sets aside what is still there.
      </EmptyState>
      {restore.error ? (
        <Banner tone="act" title="The batch stays cancelled">
          {failureWords(restore.error)}
        </Banner>
      ) : null}
    </div>
  );
}
