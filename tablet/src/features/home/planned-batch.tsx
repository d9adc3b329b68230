import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { runSummarySchema, type Batch } from '@steepfall/shared/contracts';
import { formatVolume, type UnitPreferences } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Link, useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { useMay } from '#lib/session.ts';
import { formatLevel, useUnits } from '#lib/units.ts';
import { failureWords, localDate } from '#lib/words.ts';

/** What is looked at with the own eyes before the first step. */
const kitWords = (units: UnitPreferences) => [
  'The keg is sanitised, purged and vented.',
  'The kettle is clean, and the chiller is at hand.',
  `The probe reads ${formatLevel(0, units)} in ice water.`,
];

/** A batch that waits for its day. */
export function PlannedBatch({ batch, today }: { batch: Batch; today: string }) {
  const units = useUnits();
  const day = localDate(batch.plannedOn);
  const isDue = batch.plannedOn <= today;
  return (
    <li className="flex flex-wrap items-center gap-x-7 gap-y-4 border-t-2 border-hair py-5">
      <p className="w-20 shrink-0">
        <span className="block text-note text-soft">{format(day, 'EEE, MMM')}</span>
        <span className="block text-display tabular-nums">{format(day, 'd')}</span>
      </p>
      <div className="min-w-56 flex-1">
        <p className="text-title">
          <Link to={`/batches/${batch.id}`} className="hover:underline hover:decoration-2 hover:underline-offset-4">
            {batch.recipeName}
          </Link>
        </p>
        <p className="mt-1 text-body text-soft">
          batch {batch.batchNumber} · {formatVolume(batch.volumeL, { unit: units.volume })} · revision{' '}
          {batch.revisionNumber}
        </p>
      </div>
      <StartRun batch={batch} isDue={isDue} />
    </li>
  );
}

/** The button that starts the run of a batch, and the question before it. */
export function StartRun({ batch, isDue }: { batch: Batch; isDue: boolean }) {
  const may = useMay();
  const [isAsking, setIsAsking] = useState(false);
  if (!may('runs:act')) return null;
  return (
    <>
      <Button look={isDue ? 'primary' : 'plain'} size="sheet" onClick={() => setIsAsking(true)}>
        Start the run
      </Button>
      <StartRunDialog batch={batch} isOpen={isAsking} onClose={() => setIsAsking(false)} />
    </>
  );
}

function StartRunDialog({ batch, isOpen, onClose }: { batch: Batch; isOpen: boolean; onClose: () => void }) {
  const navigate = useNavigate();
  const units = useUnits();
  const client = useQueryClient();
  const start = useMutation({
    mutationFn: () => callHubFor(runSummarySchema, `batches/${batch.id}/runs`, { method: 'POST' }),
    onSuccess: (run) => {
      void client.invalidateQueries({ queryKey: ['runs'] });
      void client.invalidateQueries({ queryKey: ['batches'] });
      void client.invalidateQueries({ queryKey: ['stores'] });
      void navigate(`/runs/${run.id}`);
    },
  });
  return (
    <Dialog
      isOpen={isOpen}
      onClose={onClose}
      title="Is the kit ready?"
      actions={
        <>
          <Button
            look="primary"
            size="sheet"
            onClick={() => start.mutate()}
            isBusy={start.isPending}
            busyLabel="Starting"
          >
            It is ready, start
          </Button>
          <Button size="sheet" onClick={onClose}>
            Not yet
          </Button>
        </>
      }
    >
      <p className="text-soft">
        {batch.recipeName}, batch {batch.batchNumber}
      </p>
      <ul className="mt-4 grid gap-3 text-lead">
        {kitWords(units).map((words) => (
          <li key={words} className="flex gap-3">
            <span aria-hidden="true" className="mt-[0.7em] h-0.5 w-5 shrink-0 bg-edge" />
            {words}
          </li>
        ))}
      </ul>
      {start.isError ? (
        <div className="mt-6">
          <Banner tone="act" title="The run did not start">
            {failureWords(start.error)}
          </Banner>
        </div>
      ) : null}
    </Dialog>
  );
}
