import { storesColumns } from '@steepfall/shared/stores';

const cell = (text: string) => (/[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** The head with every column, and one row that shows what a cell looks like: a tea. */
export function csvTemplate(): string {
  const heads = storesColumns.map(({ name }) => name);
  const row = storesColumns.map((column) => (!column.for || column.for.includes('tea') ? column.example : ''));
  return `${[heads, row].map((cells) => cells.map(cell).join(',')).join('\r\n')}\r\n`;
}
