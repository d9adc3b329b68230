import type { ImportPreview } from '@steepfall/shared/contracts';
import { readStoresRow, type IngredientFacts, type LotFacts } from '@steepfall/shared/stores';
import { inMilligrams } from '../stock-book.service.js';
import type { TableRow } from './read-table.js';

/** An ingredient that is on the shelf already. */
export interface KnownIngredient {
  id: string;
  facts: IngredientFacts;
  lotCodes: readonly string[];
}

type ImportRow = ImportPreview['rows'][number];

export interface PlannedRow {
  shown: ImportRow;
  isSkipped: boolean;
  /** What it brings; null where it is bad, or skipped. */
  brings: {
    /** Rows with the same key belong to one ingredient. */
    key: string;
    facts: IngredientFacts;
    lot: { facts: LotFacts; massG: number } | null;
  } | null;
}

/** What is there for an ingredient while the rows are gone through, and who brought it. */
interface Shelf {
  facts: IngredientFacts;
  /** By the lot number in lower case: the row that brings it, or null when it is on the shelf. */
  codes: Map<string, number | null>;
}

/** Letters in both cases are one name. */
export const ingredientKey = ({ kind, name }: Pick<IngredientFacts, 'kind' | 'name'>): string =>
  `${kind} ${name.toLowerCase()}`;

/** What each row would do, beside what is on the shelf and after the rows above it. */
export function planImport(
  table: readonly TableRow[],
  known: readonly KnownIngredient[],
  skipRows: ReadonlySet<number>,
): PlannedRow[] {
  const shelves = new Map(
    known.map(({ facts, lotCodes }): [string, Shelf] => [
      ingredientKey(facts),
      { facts, codes: new Map(lotCodes.map((code) => [code.toLowerCase(), null])) },
    ]),
  );
  return table.map((row) => planRow(row, shelves, skipRows.has(row.row)));
}

function planRow(row: TableRow, shelves: Map<string, Shelf>, isSkipped: boolean): PlannedRow {
  const read = readStoresRow(row.record);
  const problems = read.kind === 'bad' ? [...read.problems] : [];
  if (row.hasMoreCells)
    problems.push({
      column: 'row',
      detail: 'There are more cells than heads: put text with a comma in quotation marks.',
    });
  const shown = { ...rawWords(row), massG: null, does: 'nothing' as const, problems };
  if (read.kind === 'bad' || problems.length > 0) return { shown, isSkipped, brings: null };

  const { facts } = read;
  const lot = read.lot && { facts: read.lot.facts, massG: inMilligrams(read.lot.massG) };
  const key = ingredientKey(facts);
  const shelf = shelves.get(key);
  problems.push(...otherStuff(facts, shelf), ...takenCode(lot, shelf));
  if (lot?.massG === 0) problems.push({ column: 'mass', detail: 'A mass of 0.001 g or more.' });
  const words = { ingredient: facts.name, kind: facts.kind, lot: lot?.facts.code ?? '', massG: lot?.massG ?? null };
  if (problems.length > 0 || isSkipped) return { shown: { ...shown, ...words }, isSkipped, brings: null };

  const { codes } = shelf ?? { codes: new Map<string, number | null>() };
  if (lot) codes.set(lot.facts.code.toLowerCase(), row.row);
  if (!shelf) shelves.set(key, { facts, codes });
  const does = !shelf ? 'new-ingredient' : lot ? 'new-lot' : 'nothing';
  return { shown: { ...shown, ...words, does }, isSkipped, brings: { key, facts, lot } };
}

function rawWords({ row, record }: TableRow) {
  const cell = (name: string) =>
    Object.entries(record)
      .find(([head]) => head.toLowerCase() === name)?.[1]
      .slice(0, 80) ?? '';
  return { row, ingredient: cell('name'), kind: cell('kind'), lot: cell('lot') };
}

/** What makes two jars different stuff, and the column where it stands. */
const stuff = [
  ['salt', 'what'],
  ['acid', 'what'],
  ['tea', 'what'],
  ['form', 'form'],
  ['assayPercent', 'strength %'],
  ['strengthPercent', 'strength %'],
] as const;

function otherStuff(facts: IngredientFacts, shelf: Shelf | undefined): ImportRow['problems'] {
  if (!shelf) return [];
  const [before, now] = [shelf.facts, facts] as unknown as Record<string, unknown>[];
  return stuff
    .filter(([member]) => before?.[member] !== now?.[member])
    .map(([, column]) => ({
      column,
      detail: `There is another "${shelf.facts.name}" with something else here: give this one a name of its own.`,
    }));
}

function takenCode(lot: { facts: LotFacts } | null, shelf: Shelf | undefined): ImportRow['problems'] {
  const by = lot && shelf?.codes.get(lot.facts.code.toLowerCase());
  if (by === null && lot)
    return [{ column: 'lot', detail: 'This lot is on the shelf already: skip this row, and count the lot there.' }];
  return by ? [{ column: 'lot', detail: `Row ${by} has this lot already: put them together in one row.` }] : [];
}
