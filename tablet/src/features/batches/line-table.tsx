import { useMemo } from 'react';
import { createColumnHelper, getCoreRowModel, getPaginationRowModel, useReactTable } from '@tanstack/react-table';
import { formatDuration, formatTemp } from '@steepfall/shared/units';
import { DataTable } from '#components/data-table.tsx';
import { clockTime } from '#lib/words.ts';
import { useUnits } from '#lib/units.ts';
import type { LinePoint } from '#lib/liquid-line.ts';
import type { Flag } from './flag-layout.ts';
import { lineRows, type LineRow } from './record-view.ts';

interface LineTableProps {
  line: readonly LinePoint[];
  flags: readonly Flag[];
  /** Run clock. */
  startedAtMs: number;
}

const column = createColumnHelper<LineRow>();

/** The recorded line as numbers. */
export function LineTable({ line, flags, startedAtMs }: LineTableProps) {
  const { temperature } = useUnits();
  const rows = useMemo(() => lineRows(line, flags), [line, flags]);
  const columns = useMemo(
    () => [
      column.accessor('atMs', {
        header: 'Clock',
        enableSorting: false,
        cell: ({ getValue }) => <span className="tabular-nums">{clockTime(getValue())}</span>,
      }),
      column.display({
        id: 'since',
        header: 'Into the run',
        meta: { isNumber: true },
        cell: ({ row }) => formatDuration((row.original.atMs - startedAtMs) / 1000),
      }),
      column.accessor('tempC', {
        header: 'Liquid',
        enableSorting: false,
        meta: { isNumber: true },
        cell: ({ getValue }) => formatTemp(getValue(), { unit: temperature }),
      }),
      column.accessor('happened', {
        header: 'What happened',
        enableSorting: false,
        cell: ({ getValue }) => <span className="font-medium">{getValue()}</span>,
      }),
    ],
    [startedAtMs, temperature],
  );
  // eslint-disable-next-line react-hooks/incompatible-library -- its functions are used in this render only
  const table = useReactTable({
    data: rows,
    columns,
    getCoreRowModel: getCoreRowModel(),
    getPaginationRowModel: getPaginationRowModel(),
    initialState: { pagination: { pageSize: 20 } },
  });
  return <DataTable table={table} caption="The recorded temperature, and what happened" countWord="rows" />;
}
