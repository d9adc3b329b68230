import type { z } from 'zod';
import {
  acidSchema,
  hopFormSchema,
  ingredientKindSchema,
  leafFormSchema,
  saltSchema,
  teaKindSchema,
  type IngredientKind,
} from '../sheets/index.js';
import { guardedCell, readChoice, readMassG, readNumber, unguardedCell, wordsOf, type Cell } from './csv-cells.js';
import { columnKey, storesColumns, type StoresCellProblem, type StoresColumnName } from './csv-columns.js';
import { ingredientFactsSchema, lotFactsSchema, type IngredientFacts, type LotFacts } from './ingredient.js';

/** One row of the stores as a file: cells by the head of their column. */
export type StoresRecord = Readonly<Record<string, string>>;

export type StoresRow =
  | { kind: 'good'; facts: IngredientFacts; lot: { facts: LotFacts; massG: number } | null }
  | { kind: 'bad'; problems: StoresCellProblem[] };

/** What a member of the facts is called in the file. */
const columnOf: Readonly<Record<string, StoresColumnName>> = {
  kind: 'kind',
  name: 'name',
  salt: 'what',
  acid: 'what',
  tea: 'what',
  form: 'form',
  assayPercent: 'strength %',
  strengthPercent: 'strength %',
  caffeineMgPerG: 'caffeine mg/g',
  lowStockG: 'low stock',
  allergens: 'allergens',
  code: 'lot',
  massG: 'mass',
  receivedOn: 'received on',
  bestBefore: 'best before',
  pricePerKg: 'price per kg',
  note: 'note',
  alphaPercent: 'alpha %',
  oilMlPer100G: 'oil mL/100 g',
  harvestedOn: 'harvested on',
  storageIndex: 'storage index',
};

const lotColumns: readonly StoresColumnName[] = ['lot', 'mass', 'received on', 'best before', 'price per kg', 'note'];
const hopColumns: readonly StoresColumnName[] = ['alpha %', 'oil mL/100 g', 'harvested on', 'storage index'];
const MOST_MASS_G = 1_000_000;

/** The cells of one row, and what was found wrong with them: one problem a column. */
class RowReader {
  readonly problems: StoresCellProblem[] = [];
  private readonly cells: ReadonlyMap<string, string>;

  constructor(record: StoresRecord) {
    this.cells = new Map(Object.entries(record).map(([head, text]) => [columnKey(head), unguardedCell(text).trim()]));
  }

  text(column: StoresColumnName): string {
    return this.cells.get(columnKey(column)) ?? '';
  }

  isEmpty(columns: readonly StoresColumnName[]): boolean {
    return columns.every((column) => this.text(column) === '');
  }

  /** What was read; undefined after a problem, which is then on the list. */
  read<T>(column: StoresColumnName, reader: (text: string) => Cell<T>): T | undefined {
    const cell = reader(this.text(column));
    if ('value' in cell) return cell.value;
    this.complain(column, cell.detail);
    return undefined;
  }

  /** Null for an empty cell. */
  readOptional<T>(column: StoresColumnName, reader: (text: string) => Cell<T>): T | null | undefined {
    return this.text(column) === '' ? null : this.read(column, reader);
  }

  complain(column: StoresColumnName, detail: string): void {
    if (!this.problems.some((problem) => problem.column === column)) this.problems.push({ column, detail });
  }

  /** The same rules as everywhere; what they refuse is told at its column. */
  check<Schema extends z.ZodType>(schema: Schema, raw: unknown): z.infer<Schema> | undefined {
    const parsed = schema.safeParse(raw);
    if (parsed.success) return parsed.data;
    for (const { path, message } of parsed.error.issues) {
      this.complain(columnOf[String(path.at(-1) ?? '')] ?? 'kind', message);
    }
    return undefined;
  }
}

function readFacts(row: RowReader, kind: IngredientKind): IngredientFacts | undefined {
  const common = {
    name: row.text('name'),
    lowStockG: row.readOptional('low stock', readMassG),
    allergens: row.text('allergens'),
  };
  return row.check(ingredientFactsSchema, { ...common, kind, ...factsOfKind(row, kind) });
}

function factsOfKind(row: RowReader, kind: IngredientKind): object {
  const percent = (text: string) => readNumber(text, '%');
  switch (kind) {
    case 'salt':
      return {
        salt: row.read('what', (text) => readChoice(text, saltSchema.options)),
        assayPercent: row.text('strength %') === '' ? 100 : row.read('strength %', percent),
      };
    case 'acid':
      return {
        acid: row.read('what', (text) => readChoice(text, acidSchema.options)),
        strengthPercent: row.read('strength %', (text) =>
          text === ''
            ? { detail: 'Write the strength that is on the bottle; 100 for a dry, pure acid.' }
            : percent(text),
        ),
      };
    case 'tea':
      return {
        tea: row.read('what', (text) => readChoice(text, teaKindSchema.options)),
        form: row.read('form', (text) => readChoice(text, leafFormSchema.options)),
        caffeineMgPerG: row.readOptional('caffeine mg/g', (text) => readNumber(text, 'mg/g')),
      };
    case 'hops':
      return { form: row.read('form', (text) => readChoice(text, hopFormSchema.options)) };
    case 'other':
      return {};
  }
}

function refuseForeignColumns(row: RowReader, kind: IngredientKind): void {
  for (const { name, for: kinds } of storesColumns) {
    if (!kinds || kinds.includes(kind) || row.text(name) === '') continue;
    row.complain(name, `Only for ${kinds.join(' and ')}: empty this cell.`);
  }
}

const date = (row: RowReader, column: StoresColumnName) => row.text(column) || null;

function readHops(row: RowReader): object | null {
  if (row.isEmpty(hopColumns)) return null;
  return {
    alphaPercent: row.read('alpha %', (text) =>
      text === '' ? { detail: 'Write the alpha acids, such as 6.5.' } : readNumber(text, '%'),
    ),
    oilMlPer100G: row.readOptional('oil mL/100 g', (text) => readNumber(text, 'mL/100 g')),
    harvestedOn: date(row, 'harvested on'),
    storageIndex: row.readOptional('storage index', (text) => readNumber(text)),
  };
}

function readReceivedG(text: string): Cell<number> {
  if (text === '') return { detail: 'Write what there is of it, such as 250 g.' };
  const cell = readMassG(text);
  if ('detail' in cell) return cell;
  if (!(cell.value > 0)) return { detail: 'A mass above 0 g. Leave out a lot that is used up.' };
  return cell.value > MOST_MASS_G ? { detail: 'At most 1000 kg.' } : cell;
}

function readLot(row: RowReader, kind: IngredientKind): { facts: LotFacts; massG: number } | null {
  if (row.isEmpty(kind === 'hops' ? [...lotColumns, ...hopColumns] : lotColumns)) return null;
  const massG = row.read('mass', readReceivedG);
  const facts = row.check(lotFactsSchema, {
    code: row.text('lot'),
    receivedOn: row.text('received on'),
    bestBefore: date(row, 'best before'),
    pricePerKg: row.readOptional('price per kg', (text) => readNumber(text)),
    note: row.text('note'),
    hops: kind === 'hops' ? readHops(row) : null,
  });
  return facts && massG !== undefined ? { facts, massG } : null;
}

/**
 * What a row of a file says, or what to do at which column. Masses are g unless g, kg, oz or lb is written; a decimal comma is read as a
 * point; empty cells are what is not known.
 */
export function readStoresRow(record: StoresRecord): StoresRow {
  const row = new RowReader(record);
  const kind = row.read('kind', (text) => readChoice(text, ingredientKindSchema.options));
  if (kind === undefined) return { kind: 'bad', problems: row.problems };
  const facts = readFacts(row, kind);
  const lot = readLot(row, kind);
  refuseForeignColumns(row, kind);
  return facts && row.problems.length === 0 ? { kind: 'good', facts, lot } : { kind: 'bad', problems: row.problems };
}

const shown = (value: number | string | null | undefined) => (value === null || value === undefined ? '' : `${value}`);
const grams = (massG: number | null) => (massG === null ? '' : `${massG} g`);

function whatOf(facts: IngredientFacts): string {
  if (facts.kind === 'salt') return wordsOf(facts.salt);
  if (facts.kind === 'acid') return wordsOf(facts.acid);
  return facts.kind === 'tea' ? wordsOf(facts.tea) : '';
}

function strengthOf(facts: IngredientFacts): number | null {
  if (facts.kind === 'salt') return facts.assayPercent;
  return facts.kind === 'acid' ? facts.strengthPercent : null;
}

/** A row for a file, from an ingredient and one of its lots: what `readStoresRow` reads back. Cells are guarded against spreadsheets. */
export function storesRowOf(
  facts: IngredientFacts,
  lot: (LotFacts & { stockG: number }) | null,
): Record<StoresColumnName, string> {
  const cells: Record<StoresColumnName, string> = {
    kind: facts.kind,
    name: facts.name,
    what: whatOf(facts),
    form: facts.kind === 'tea' || facts.kind === 'hops' ? wordsOf(facts.form) : '',
    'strength %': shown(strengthOf(facts)),
    'caffeine mg/g': shown(facts.kind === 'tea' ? facts.caffeineMgPerG : null),
    'low stock': grams(facts.lowStockG),
    allergens: facts.allergens,
    lot: shown(lot?.code),
    mass: lot ? grams(lot.stockG) : '',
    'received on': shown(lot?.receivedOn),
    'best before': shown(lot?.bestBefore),
    'price per kg': shown(lot?.pricePerKg),
    note: shown(lot?.note),
    'alpha %': shown(lot?.hops?.alphaPercent),
    'oil mL/100 g': shown(lot?.hops?.oilMlPer100G),
    'harvested on': shown(lot?.hops?.harvestedOn),
    'storage index': shown(lot?.hops?.storageIndex),
  };
  for (const { name } of storesColumns) cells[name] = guardedCell(cells[name]);
  return cells;
}
