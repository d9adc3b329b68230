/* eslint-disable jsx-a11y/no-redundant-roles, jsx-a11y/no-interactive-element-to-noninteractive-role -- as cards the rows are no table boxes, and Safari then drops the roles that they would have by themselves */
import { flexRender, type RowData, type Table } from '@tanstack/react-table';
import { Button } from './button.tsx';
import { classNames } from './class-names.ts';
import { SelectField } from './field.tsx';

declare module '@tanstack/react-table' {
  // The names of the type parameters are those of the library's own declaration.
  // eslint-disable-next-line @typescript-eslint/no-unused-vars
  interface ColumnMeta<TData extends RowData, TValue> {
    /** Numbers stand at the right, with equal widths. */
    isNumber?: boolean;
    /** Leads the card on a phone, without its label. */
    isLead?: boolean;
    /** Only where the table has room for it; a card always has. */
    from?: 'lg' | 'xl';
  }
}

interface DataTableProps<Row extends RowData> {
  table: Table<Row>;
  /** What the table holds, for those who hear it. */
  caption: string;
  /** What is counted: "batches". */
  countWord: string;
}

const roomy = { lg: 'sm:max-lg:hidden', xl: 'sm:max-xl:hidden' } as const;
const sortWords = { asc: 'ascending', desc: 'descending' } as const;

/** A table that sorts and turns pages; on a phone each row is a card. Roles are written out, since the card layout takes them away. */
export function DataTable<Row extends RowData>({ table, caption, countWord }: DataTableProps<Row>) {
  const rows = table.getRowModel().rows;
  return (
    <div className="min-w-0">
      <CardOrder table={table} />
      <table role="table" className="block w-full border-collapse text-left text-body sm:table">
        <caption className="sr-only">{caption}</caption>
        <thead role="rowgroup" className="hidden sm:table-header-group">
          {table.getHeaderGroups().map((group) => (
            <tr role="row" key={group.id} className="border-b-2 border-edge">
              {group.headers.map((header) => {
                const sorted = header.column.getIsSorted();
                const { isNumber, from } = header.column.columnDef.meta ?? {};
                const label = flexRender(header.column.columnDef.header, header.getContext());
                return (
                  <th
                    role="columnheader"
                    key={header.id}
                    scope="col"
                    aria-sort={sorted ? sortWords[sorted] : undefined}
                    className={classNames(
                      'pr-6 text-note font-medium text-soft last:pr-0',
                      isNumber && 'text-right',
                      from && roomy[from],
                    )}
                  >
                    {header.column.getCanSort() ? (
                      <button
                        type="button"
                        onClick={header.column.getToggleSortingHandler()}
                        className="inline-flex min-h-12 cursor-pointer items-center gap-1.5 hover:text-text"
                      >
                        {label}
                        <SortGlyph sorted={sorted} />
                      </button>
                    ) : (
                      <span className="inline-flex min-h-12 items-center">{label}</span>
                    )}
                  </th>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody role="rowgroup" className="block sm:table-row-group">
          {rows.map((row) => (
            <tr
              role="row"
              key={row.id}
              className="block border-t-2 border-hair py-3 sm:table-row sm:border-t-0 sm:border-b sm:py-0"
            >
              {row.getVisibleCells().map((cell) => {
                const meta = cell.column.columnDef.meta;
                const header = cell.column.columnDef.header;
                return (
                  <td
                    role="cell"
                    key={cell.id}
                    className={classNames(
                      'flex justify-between gap-6 py-0.5 align-middle sm:table-cell sm:h-14 sm:py-2 sm:pr-6 sm:last:pr-0',
                      meta?.isNumber && 'tabular-nums sm:text-right',
                      meta?.isLead && 'text-lead sm:text-body',
                      meta?.from && roomy[meta.from],
                      cell.getValue() === '' && 'max-sm:hidden',
                    )}
                  >
                    {meta?.isLead || typeof header !== 'string' ? null : (
                      <span aria-hidden="true" className="text-soft sm:hidden">
                        {header}
                      </span>
                    )}
                    {flexRender(cell.column.columnDef.cell, cell.getContext())}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
      <Pages table={table} countWord={countWord} />
    </div>
  );
}

/** On a phone there are no column heads to press. */
function CardOrder<Row extends RowData>({ table }: { table: Table<Row> }) {
  const columns = table.getAllLeafColumns().filter((column) => column.getCanSort());
  const [sorted] = table.getState().sorting;
  if (columns.length === 0) return null;
  return (
    <div className="mb-4 flex items-end gap-3 sm:hidden">
      <div className="flex-1">
        <SelectField
          label="Order by"
          value={sorted?.id ?? ''}
          onChange={(event) => table.setSorting([{ id: event.target.value, desc: sorted?.desc ?? false }])}
        >
          {sorted ? null : <option value="">as it came</option>}
          {columns.map(({ id, columnDef: { header } }) => (
            <option key={id} value={id}>
              {typeof header === 'string' ? header : id}
            </option>
          ))}
        </SelectField>
      </div>
      <Button
        disabled={!sorted}
        aria-label={sorted?.desc ? 'Descending; turn around' : 'Ascending; turn around'}
        onClick={() => sorted && table.setSorting([{ ...sorted, desc: !sorted.desc }])}
      >
        <SortGlyph sorted={sorted ? (sorted.desc ? 'desc' : 'asc') : false} />
      </Button>
    </div>
  );
}

function SortGlyph({ sorted }: { sorted: false | 'asc' | 'desc' }) {
  return (
    <svg viewBox="0 0 12 12" aria-hidden="true" className="size-3" fill="none" stroke="currentColor" strokeWidth="2">
      {sorted === 'asc' ? (
        <path d="M1 9l5-6 5 6" />
      ) : sorted === 'desc' ? (
        <path d="M1 3l5 6 5-6" />
      ) : (
        <path d="M2 6h8" />
      )}
    </svg>
  );
}

function Pages<Row extends RowData>({ table, countWord }: { table: Table<Row>; countWord: string }) {
  const count = table.getPageCount();
  if (count <= 1) return null;
  const { pageIndex, pageSize } = table.getState().pagination;
  const total = table.getPrePaginationRowModel().rows.length;
  const from = pageIndex * pageSize + 1;
  return (
    <div className="mt-4 flex flex-wrap items-center justify-between gap-4">
      <p role="status" className="text-body text-soft tabular-nums">
        {from} to {Math.min(from + pageSize - 1, total)} of {total} {countWord}
      </p>
      <div className="flex gap-3">
        <Button disabled={!table.getCanPreviousPage()} onClick={() => table.previousPage()}>
          Page back
        </Button>
        <Button disabled={!table.getCanNextPage()} onClick={() => table.nextPage()}>
          Page on
        </Button>
      </div>
    </div>
  );
}
