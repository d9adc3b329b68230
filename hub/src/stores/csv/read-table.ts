import { ProblemError } from '@steepfall/shared/problems';
import { checkStoresHead, type StoresRecord } from '@steepfall/shared/stores';
import { CsvError, parse } from 'csv-parse/sync';

/** One row of a file that has something in it. Numbered as a spreadsheet does: the head is row 1, empty rows count. */
export interface TableRow {
  row: number;
  record: StoresRecord;
  /** Cells stand where no column has a head. */
  hasMoreCells: boolean;
}

const MOST_ROWS = 5000;
const MOST_ERRORS = 20;
const SEPARATORS = [',', ';', '\t'];

/** Reads a file of the stores; refuses the whole of it where the head is not that of the stores. */
export function readTable(csv: string): TableRow[] {
  const [head = [], ...body] = cellsOf(csv);
  const heads = head.map((cell) => cell.trim());
  const wrong = checkStoresHead(heads.filter((name) => name !== ''));
  if (wrong.length > 0) throw unreadable(wrong.slice(0, MOST_ERRORS).map(({ detail }) => brief(detail)));
  const rows = body.map((cells, index) => rowOf(heads, cells, index + 2)).filter(({ isEmpty }) => !isEmpty);
  if (rows.length === 0) throw unreadable(['There is nothing below the head: write one ingredient or lot a row.']);
  if (rows.length > MOST_ROWS)
    throw unreadable([`There are ${rows.length} rows: import at most ${MOST_ROWS} at once, in several files.`]);
  return rows.map(({ row, record, hasMoreCells }) => ({ row, record, hasMoreCells }));
}

function cellsOf(csv: string): string[][] {
  try {
    return parse(csv, { bom: true, delimiter: separatorOf(csv), relax_column_count: true, relax_quotes: true });
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    if (error.code === 'CSV_QUOTE_NOT_CLOSED')
      throw unreadable([`A quotation mark opens in row ${Number(error['records']) + 1} and is never closed.`]);
    throw unreadable(['This is not a table of rows and columns. Save it as CSV, then choose it again.']);
  }
}

/** What stands most often in the head, where no name has it in it. */
function separatorOf(csv: string): string {
  const head = csv.trimStart().split(/[\r\n]/, 1)[0] ?? '';
  const count = (separator: string) => head.split(separator).length;
  return SEPARATORS.reduce((best, separator) => (count(separator) > count(best) ? separator : best));
}

function rowOf(heads: readonly string[], cells: readonly string[], row: number): TableRow & { isEmpty: boolean } {
  const named = heads.flatMap((head, index) => (head === '' ? [] : [[head, cells[index] ?? ''] as const]));
  return {
    row,
    record: Object.fromEntries(named),
    hasMoreCells: cells.some((cell, index) => cell.trim() !== '' && !heads[index]),
    isEmpty: cells.every((cell) => cell.trim() === ''),
  };
}

const brief = (text: string) => (text.length > 400 ? `${text.slice(0, 400)}…` : text);

function unreadable(details: readonly string[]): ProblemError {
  const errors = details.map((detail) => ({ pointer: '/csv', detail }));
  return new ProblemError('not-valid', 'The file was not read.', { errors });
}
