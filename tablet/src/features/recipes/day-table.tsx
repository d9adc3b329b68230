import { useMemo } from 'react';
import { createColumnHelper, getCoreRowModel, useReactTable } from '@tanstack/react-table';
import type { PlannedDay } from '@steepfall/shared/desk';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { formatDuration } from '@steepfall/shared/units';
import { DataTable } from '#components/data-table.tsx';
import { formatLevel, useUnits } from '#lib/units.ts';
import { dayEvents, eventWords, type DayEvent } from './day-events.ts';

const column = createColumnHelper<DayEvent>();

/** The planned line as numbers. */
export function DayTable({ day, document }: { day: PlannedDay; document: RecipeDocument }) {
  const units = useUnits();
  const rows = useMemo(() => dayEvents(day, document), [day, document]);
  const columns = useMemo(
    () => [
      column.accessor(eventWords, {
        id: 'what',
        header: 'What happens',
        enableSorting: false,
        meta: { isLead: true },
        cell: ({ getValue }) => <span className="font-medium">{getValue()}</span>,
      }),
      column.accessor('atMs', {
        header: 'Since the heat',
        enableSorting: false,
        meta: { isNumber: true },
        cell: ({ getValue }) => formatDuration(getValue() / 1000),
      }),
      column.accessor('tempC', {
        header: 'Liquid',
        enableSorting: false,
        meta: { isNumber: true },
        cell: ({ getValue }) => formatLevel(Math.round(getValue() * 10) / 10, units),
      }),
    ],
    [units],
  );
  // eslint-disable-next-line react-hooks/incompatible-library -- its functions are used in this render only
  const table = useReactTable({ data: rows, columns, getCoreRowModel: getCoreRowModel() });
  return <DataTable table={table} caption="The planned day" countWord="moments" />;
}
