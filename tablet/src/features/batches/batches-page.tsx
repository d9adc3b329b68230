import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { createColumnHelper } from '@tanstack/react-table';
import type { Batch } from '@steepfall/shared/contracts';
import { formatVolume } from '@steepfall/shared/units';
import { Link } from 'react-router-dom';
import { ButtonLink } from '#components/button.tsx';
import { DataTable } from '#components/data-table.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { TextField } from '#components/field.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { Segmented } from '#components/segmented.tsx';
import { useListTable } from '#components/use-list-table.ts';
import { batchesQuery, cancelledBatchesQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { calendarDay, failureWords } from '#lib/words.ts';
import { BatchStatus } from './batch-status.tsx';

type StatusChoice = Batch['status'] | 'all';
const statusChoices: { value: StatusChoice; label: string }[] = [
  { value: 'all', label: 'All' },
  { value: 'planned', label: 'Planned' },
  { value: 'running', label: 'Running' },
  { value: 'finished', label: 'Finished' },
  { value: 'abandoned', label: 'Given up' },
  { value: 'cancelled', label: 'Cancelled' },
];

const column = createColumnHelper<Batch>();
const columns = [
  column.accessor('batchNumber', {
    header: 'Batch',
    meta: { isLead: true },
    cell: ({ row: { original } }) => (
      <Link
        to={`/batches/${original.id}`}
        className="inline-flex min-h-12 items-center font-semibold tabular-nums underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
      >
        {original.batchNumber}
      </Link>
    ),
  }),
  column.accessor('recipeName', {
    header: 'Recipe',
    cell: ({ row: { original } }) => (
      <span>
        {original.recipeName} <span className="text-soft">rev. {original.revisionNumber}</span>
      </span>
    ),
  }),
  column.accessor('plannedOn', { header: 'Day', cell: ({ getValue }) => calendarDay(getValue()) }),
  column.accessor('volumeL', {
    header: 'Volume',
    meta: { isNumber: true },
    cell: ({ getValue }) => <VolumeText volumeL={getValue()} />,
  }),
  column.accessor('status', {
    header: 'State',
    filterFn: 'equalsString',
    cell: ({ getValue }) => <BatchStatus status={getValue()} />,
  }),
];

function VolumeText({ volumeL }: { volumeL: number }) {
  return formatVolume(volumeL, { unit: useUnits().volume });
}

const none: Batch[] = [];

export function BatchesPage() {
  const { house } = useKnown();
  const may = useMay();
  const batches = useQuery({ ...batchesQuery, refetchInterval: 30_000 });
  return (
    <Page
      title="Batch book"
      above={house.name}
      lead="Every batch, its line, its numbers and what became of it."
      action={may('recipes:read') && may('batches:manage') ? <ButtonLink to="/recipes">Plan a batch</ButtonLink> : null}
    >
      {batches.error ? (
        <Failed title="The book may be old" onRetry={() => void batches.refetch()}>
          {failureWords(batches.error)}
        </Failed>
      ) : null}
      {batches.data ? <Book batches={batches.data} /> : batches.isPending ? <Waiting>Opening the book.</Waiting> : null}
    </Page>
  );
}

function Book({ batches }: { batches: Batch[] }) {
  const [status, setStatus] = useState<StatusChoice>('all');
  const cancelled = useQuery({ ...cancelledBatchesQuery, enabled: status === 'cancelled' });
  const shown = status === 'cancelled' ? cancelled.data : batches;
  const { table, words, setWords } = useListTable({
    data: shown ?? none,
    columns,
    orderAtFirst: [{ id: 'plannedOn', desc: true }],
    only: status === 'all' ? null : { id: 'status', value: status },
  });
  if (batches.length === 0) {
    return (
      <EmptyState action={<ButtonLink to="/recipes">Look at the recipes</ButtonLink>}>
        The book is empty. The first batch that you plan from a recipe opens it.
      </EmptyState>
    );
  }
  return (
    <div className="grid gap-6">
      <div className="flex flex-wrap items-end gap-x-8 gap-y-5">
        <div className="w-full max-w-sm">
          <TextField
            label="Find"
            type="search"
            placeholder="number or recipe"
            value={words}
            onChange={(event) => setWords(event.target.value)}
          />
        </div>
        <Segmented label="State" value={status} onChange={setStatus} segments={statusChoices} />
      </div>
      {table.getRowModel().rows.length > 0 ? (
        <DataTable table={table} caption="Batches of this house" countWord="batches" />
      ) : (
        <p role="status" className="py-6 text-lead text-soft">
          No batch fits. Take a word out, or look in all states.
        </p>
      )}
    </div>
  );
}
