import { GRAMS_PER_OUNCE } from '../units/index.js';

/** A cell that was read, or what to do about it. */
export type Cell<T> = { value: T } | { detail: string };

const OUNCES_PER_POUND = 16;
const gramsPer = new Map([
  ['g', 1],
  ['kg', 1000],
  ['oz', GRAMS_PER_OUNCE],
  ['lb', OUNCES_PER_POUND * GRAMS_PER_OUNCE],
  ['lbs', OUNCES_PER_POUND * GRAMS_PER_OUNCE],
]);

/** A number in plain digits, then whatever is written behind it. */
const NUMBER_AND_UNIT = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)\s*([a-z%].*)?$/i;
const GROUPED = /^[+-]?\d{1,3}(?:[,\s]\d{3})+(?!\d)/;
const DECIMAL_COMMA = /^([+-]?\d+),(\d+)/;

function numberAndUnit(text: string): Cell<{ number: number; unit: string }> {
  const plain = text.trim().replace('\u2212', '-');
  if (GROUPED.test(plain)) {
    return { detail: `"${text}" can be read in two ways: write thousands without a mark, such as 1500.` };
  }
  const match = NUMBER_AND_UNIT.exec(plain.replace(DECIMAL_COMMA, '$1.$2'));
  const number = Number(match?.[1]);
  if (!match || !Number.isFinite(number)) return { detail: `"${text}" is no number: write digits, such as 2.5.` };
  return { value: { number, unit: (match[2] ?? '').trim().toLowerCase() } };
}

/** A number; a decimal comma is read as a point, and the unit of its column may stand behind it. */
export function readNumber(text: string, unit = ''): Cell<number> {
  const cell = numberAndUnit(text);
  if ('detail' in cell) return cell;
  const isOwnUnit = cell.value.unit === '' || cell.value.unit === unit.toLowerCase();
  if (isOwnUnit) return { value: cell.value.number };
  return {
    detail: `Write the number alone${unit ? `, or with ${unit}` : ''}: "${cell.value.unit}" is not known here.`,
  };
}

/** A mass in g; kg, oz and lb are read when they are written. */
export function readMassG(text: string): Cell<number> {
  const cell = numberAndUnit(text);
  if ('detail' in cell) return cell;
  const factor = gramsPer.get(cell.value.unit || 'g');
  if (factor === undefined) {
    return { detail: `"${cell.value.unit}" is no unit of mass here: write g, kg, oz or lb, such as 250 g.` };
  }
  return { value: cell.value.number * factor };
}

/** "calciumChlorideDihydrate" as it is written in a cell: "calcium chloride dihydrate". */
export function wordsOf(key: string): string {
  return key.replace(/[A-Z]/g, (capital) => ` ${capital.toLowerCase()}`);
}

const letters = (text: string) => text.toLowerCase().replace(/[^a-z0-9]/g, '');

/** One of several words, written in any case, with or without spaces. */
export function readChoice<Choice extends string>(text: string, choices: readonly Choice[]): Cell<Choice> {
  const value = choices.find((choice) => letters(choice) === letters(text));
  if (value !== undefined) return { value };
  const said = text.trim() === '' ? 'Nothing is written' : `"${text}" is not known`;
  return { detail: `${said}: write one of ${choices.map(wordsOf).join(', ')}.` };
}

const RUNS_AS_FORMULA = /^'*[=+\-@\t\r]/;
const GUARDED = /^'+[=+\-@\t\r]/;

/** Text that a spreadsheet would run as a formula gets an apostrophe in front, which spreadsheets hide. */
export function guardedCell(text: string): string {
  return RUNS_AS_FORMULA.test(text) ? `'${text}` : text;
}

/** What `guardedCell` was given. */
export function unguardedCell(text: string): string {
  return GUARDED.test(text) ? text.slice(1) : text;
}
