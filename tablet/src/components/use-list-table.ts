import { useEffect, useMemo, useState } from 'react';
import {
  getCoreRowModel,
  getFilteredRowModel,
  getPaginationRowModel,
  getSortedRowModel,
  useReactTable,
  type ColumnDef,
  type RowData,
  type SortingState,
  type Table,
  type TableOptions,
} from '@tanstack/react-table';

const ROWS_A_PAGE = 20;

type SearchOptions<Row extends RowData> = Pick<TableOptions<Row>, 'globalFilterFn' | 'getColumnCanGlobalFilter'>;

interface ListTableOptions<Row extends RowData> extends SearchOptions<Row> {
  data: Row[];
  // Each column has a type of its own.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  columns: ColumnDef<Row, any>[];
  orderAtFirst: SortingState;
  /** Only rows with this value in this column; `null`: all of them. */
  only?: { id: string; value: string } | null;
}

interface ListTable<Row extends RowData> {
  table: Table<Row>;
  /** What is looked for. */
  words: string;
  setWords: (words: string) => void;
}

/**
 * The table of a list page: sorted, searched, in pages. What is asked for anew in the background turns no page; other words or another
 * filter begin at the first one.
 */
export function useListTable<Row extends RowData>(options: ListTableOptions<Row>): ListTable<Row> {
  const { orderAtFirst, only = null, ...given } = options;
  const [sorting, setSorting] = useState(orderAtFirst);
  const [words, setWords] = useState('');
  const onlyId = only?.id;
  const onlyValue = only?.value;
  const columnFilters = useMemo(
    () => (onlyId === undefined ? [] : [{ id: onlyId, value: onlyValue }]),
    [onlyId, onlyValue],
  );
  // eslint-disable-next-line react-hooks/incompatible-library -- its functions are used while drawing only
  const table = useReactTable({
    ...given,
    state: { sorting, columnFilters, globalFilter: words },
    onSortingChange: setSorting,
    onGlobalFilterChange: setWords,
    getCoreRowModel: getCoreRowModel(),
    getSortedRowModel: getSortedRowModel(),
    getFilteredRowModel: getFilteredRowModel(),
    getPaginationRowModel: getPaginationRowModel(),
    initialState: { pagination: { pageSize: ROWS_A_PAGE } },
    autoResetPageIndex: false,
  });
  useEffect(() => table.setPageIndex(0), [table, words, columnFilters]);
  // A page that is gone is left.
  const last = Math.max(0, table.getPageCount() - 1);
  useEffect(() => {
    if (table.getState().pagination.pageIndex > last) table.setPageIndex(last);
  }, [table, last]);
  return { table, words, setWords };
}
