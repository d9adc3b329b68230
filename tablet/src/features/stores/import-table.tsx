import { useMemo, useState } from 'react';
import {
  createColumnHelper,
  getCoreRowModel,
  getPaginationRowModel,
  getSortedRowModel,
  useReactTable,
  type SortingState,
} from '@tanstack/react-table';
import type { ImportPreview } from '@steepfall/shared/contracts';
import { formatMass } from '@steepfall/shared/units';
import { DataTable } from '#components/data-table.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { TickBox } from '#components/tick-box.tsx';
import { useUnits } from '#lib/units.ts';

type Row = ImportPreview['rows'][number];

const doesWords: Record<Row['does'], string> = {
  'new-ingredient': 'a new ingredient',
  'new-lot': 'a new lot',
  nothing: 'nothing: it is there already',
};

interface ImportTableProps {
  rows: readonly Row[];
  skipRows: ReadonlySet<number>;
  onSkip: (rows: ReadonlySet<number>) => void;
}

const STATE = 'What it does';
const column = createColumnHelper<Row & { isSkipped: boolean }>();

/** Each row of the file: what it would do, or what to mend and at which column. Those to mend come first. */
export function ImportTable({ rows, skipRows, onSkip }: ImportTableProps) {
  const { mass: unit } = useUnits();
  const [sorting, setSorting] = useState<SortingState>([{ id: STATE, desc: true }]);
  const data = useMemo(() => rows.map((row) => ({ ...row, isSkipped: skipRows.has(row.row) })), [rows, skipRows]);
  const columns = useMemo(() => {
    const toggle = (row: number, isSkipped: boolean) => {
      const next = new Set(skipRows);
      if (isSkipped) next.add(row);
      else next.delete(row);
      onSkip(next);
    };
    return [
      column.accessor('row', {
        header: 'Row',
        meta: { isLead: true },
        cell: ({ getValue }) => <span className="font-medium tabular-nums">{getValue()}</span>,
      }),
      column.accessor('ingredient', { header: 'Ingredient', cell: ({ row: { original } }) => <What row={original} /> }),
      column.accessor('lot', {
        header: 'Lot',
        cell: ({ getValue }) => <span className="inline-block max-w-40 break-words sm:min-w-20">{getValue()}</span>,
      }),
      column.accessor(({ massG }) => massG ?? '', {
        id: 'massG',
        header: 'Mass',
        meta: { isNumber: true },
        cell: ({ row }) => <span className="whitespace-nowrap">{formatMass(row.original.massG, { unit })}</span>,
      }),
      column.accessor(({ problems }) => problems.length, {
        id: STATE,
        // As a card the words need the whole width: no label beside them.
        header: () => STATE,
        sortDescFirst: true,
        cell: ({ row: { original } }) => <State row={original} />,
      }),
      column.display({
        id: 'skip',
        header: 'Leave out',
        cell: ({ row: { original } }) => (
          <TickBox
            label={`Leave out row ${original.row}`}
            isLabelHidden
            isTicked={original.isSkipped}
            onTick={(isSkipped) => toggle(original.row, isSkipped)}
          />
        ),
      }),
    ];
  }, [unit, skipRows, onSkip]);
  // eslint-disable-next-line react-hooks/incompatible-library -- its functions are used in this render only
  const table = useReactTable({
    data,
    columns,
    state: { sorting },
    onSortingChange: setSorting,
    getCoreRowModel: getCoreRowModel(),
    getSortedRowModel: getSortedRowModel(),
    getPaginationRowModel: getPaginationRowModel(),
    initialState: { pagination: { pageSize: 20 } },
    // A ticked row must not throw the person back to the first page.
    autoResetPageIndex: false,
  });
  return <DataTable table={table} caption="Rows of the file" countWord="rows" />;
}

function What({ row: { ingredient, kind } }: { row: Row }) {
  return (
    <span className="text-right sm:text-left">
      {ingredient || 'without a name'} <span className="text-soft">{kind}</span>
    </span>
  );
}

function State({ row: { problems, does, isSkipped } }: { row: Row & { isSkipped: boolean } }) {
  if (isSkipped) {
    return (
      <StatusChip shape="dash" tone="soft">
        left out
      </StatusChip>
    );
  }
  if (problems.length === 0) return <span>{doesWords[does]}</span>;
  return (
    <ul className="grid min-w-0 gap-1 text-note text-ember">
      {problems.map(({ column: name, detail }) => (
        <li key={`${name} ${detail}`}>
          <span className="font-semibold">{name || 'row'}:</span> {detail}
        </li>
      ))}
    </ul>
  );
}
