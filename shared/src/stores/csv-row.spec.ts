import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { acidSchema, hopFormSchema, leafFormSchema, saltSchema, teaKindSchema } from '../sheets/index.js';
import { checkStoresHead, storesColumns } from './csv-columns.js';
import { readStoresRow, storesRowOf, type StoresRecord } from './csv-row.js';
import { ingredientFactsSchema, lotFactsSchema, type IngredientFacts, type LotFacts } from './ingredient.js';

const sencha: StoresRecord = {
  ...{ kind: 'tea', name: 'sencha', what: 'green', form: 'whole', 'caffeine mg/g': '28', 'low stock': '100' },
  ...{ lot: 'L-1', mass: '1.5 kg', 'received on': '2026-03-14', 'price per kg': '42,50' },
};
const cascade: StoresRecord = {
  ...{ kind: 'hops', name: 'Cascade', form: 'pellets', lot: 'C-1', mass: '1 lb', 'received on': '2026-03-14' },
  ...{ 'alpha %': '6.5 %' },
};
const problemsOf = (record: StoresRecord) => {
  const row = readStoresRow(record);
  return row.kind === 'bad' ? row.problems : [];
};
const detailAt = (column: string, text: string, record = sencha) => {
  const problems = problemsOf({ ...record, [column]: text });
  expect(problems.map((problem) => problem.column)).toEqual([column]);
  return problems[0]?.detail;
};

describe(readStoresRow, () => {
  it('reads an ingredient and its lot, with units, words and a decimal comma', () => {
    expect(readStoresRow(sencha)).toEqual({
      kind: 'good',
      facts: {
        ...{ kind: 'tea', name: 'sencha', tea: 'green', form: 'whole', caffeineMgPerG: 28, lowStockG: 100 },
        allergens: '',
      },
      lot: {
        massG: 1500,
        facts: {
          ...{ code: 'L-1', receivedOn: '2026-03-14', bestBefore: null, pricePerKg: 42.5, note: '', hops: null },
        },
      },
    });
    expect(readStoresRow(cascade)).toMatchObject({ lot: { massG: 453.59237, facts: { hops: { alphaPercent: 6.5 } } } });
  });

  it('knows heads and words in any case, and an ingredient without a lot', () => {
    const record = { Kind: 'Salt', ' NAME ': 'flakes', What: 'Calcium Chloride dihydrate' };
    expect(readStoresRow(record)).toMatchObject({
      kind: 'good',
      facts: { salt: 'calciumChlorideDihydrate', assayPercent: 100 },
      lot: null,
    });
  });

  it.each([
    ['mass', 'lots', '"lots" is no number: write digits, such as 2.5.'],
    ['mass', 'NaN', '"NaN" is no number: write digits, such as 2.5.'],
    ['mass', '1o0', '"o0" is no unit of mass here'],
    ['mass', '-5', 'A mass above 0 g. Leave out a lot that is used up.'],
    ['mass', '0', 'A mass above 0 g. Leave out a lot that is used up.'],
    ['mass', '1e9', 'At most 1000 kg.'],
    ['mass', '2 stone', '"stone" is no unit of mass here: write g, kg, oz or lb, such as 250 g.'],
    ['mass', '1,500', '"1,500" can be read in two ways: write thousands without a mark, such as 1500.'],
    ['mass', '', 'Write what there is of it, such as 250 g.'],
    ['received on', '14.3.2026', 'Write the date as YYYY-MM-DD.'],
    ['price per kg', '40 EUR', 'Write the number alone: "eur" is not known here.'],
    ['price per kg', '-1', 'A price of 0 or more.'],
    ['caffeine mg/g', '3 %', 'Write the number alone, or with mg/g: "%" is not known here.'],
    ['what', 'puerh', '"puerh" is not known: write one of green, white, oolong, black, herbal.'],
    ['form', '', 'Nothing is written: write one of dust, broken, whole.'],
    ['name', '', 'Give it a name.'],
    ['lot', '', 'Type the lot number.'],
    ['alpha %', '6', 'Only for hops: empty this cell.'],
    ['storage index', '0.3', 'Only for hops: empty this cell.'],
    ['kind', 'coffee', '"coffee" is not known: write one of salt, acid, tea, hops, other.'],
  ])('says what to do about %s "%s"', (column, text, detail) => {
    expect(detailAt(column, text)).toContain(detail);
  });

  it('names all that is wrong with a row, once for each column', () => {
    const bad = { ...cascade, name: '', form: 'plug', mass: 'x', 'alpha %': '', 'storage index': '9' };
    expect(problemsOf(bad).map(({ column }) => column)).toEqual(['form', 'name', 'mass', 'alpha %', 'storage index']);
  });

  it('asks for the strength of an acid, since a bottle is rarely pure', () => {
    const record = { kind: 'acid', name: 'lactic', what: 'lactic' };
    expect(detailAt('strength %', '', record)).toContain('on the bottle');
    expect(readStoresRow({ ...record, 'strength %': '80 %' })).toMatchObject({ facts: { strengthPercent: 80 } });
  });

  it('reads back every row that the stores write', () => {
    fc.assert(
      fc.property(facts, lots, (one, lot) => {
        const written = storesRowOf(one, lot);
        for (const text of Object.values(written)) expect(text).not.toMatch(/^[=+\-@\t\r]/);
        const { stockG, ...lotFacts } = lot;
        const hops = one.kind === 'hops' ? lotFacts.hops : null;
        expect(readStoresRow(storesRowOf(one, { ...lot, hops }))).toEqual({
          kind: 'good',
          facts: one,
          lot: { facts: { ...lotFacts, hops }, massG: stockG },
        });
      }),
    );
  }, 30_000);
});

describe(storesRowOf, () => {
  it('guards cells that a spreadsheet would run', () => {
    const facts = ingredientFactsSchema.parse({ kind: 'other', name: '=1+1', allergens: "'-x", lowStockG: null });
    expect(storesRowOf(facts, null)).toMatchObject({ name: "'=1+1", allergens: "''-x", lot: '', mass: '' });
    expect(readStoresRow(storesRowOf(facts, null))).toEqual({ kind: 'good', facts, lot: null });
  });
});

describe(checkStoresHead, () => {
  it('takes the columns of its own file, and tells what is missing, unknown or twice', () => {
    expect(checkStoresHead(storesColumns.map(({ name }) => name))).toEqual([]);
    expect(checkStoresHead(['Name', 'weight', 'name']).map(({ column }) => column)).toEqual(['kind', 'weight', 'name']);
  });
});

const text = (minLength: number, maxLength: number) =>
  fc
    .oneof(fc.string({ minLength, maxLength }), fc.constantFrom('=1+1', "'=x", '-7', '@a', "''+b", '+', 'a;"b'))
    .map((word) => word.trim())
    .filter((word) => word.length >= minLength);
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true }).map((value) => value + 0);
const nullable = <T>(arbitrary: fc.Arbitrary<T>) => fc.option(arbitrary, { nil: null });
const date = fc
  .record({ year: fc.integer({ min: 2000, max: 2099 }), month: fc.integer({ min: 1, max: 12 }) })
  .map(({ year, month }) => `${year}-${String(month).padStart(2, '0')}-07`);
const common = { name: text(1, 80), lowStockG: nullable(number(0, 1e6)), allergens: text(0, 200) };
const constant = <Value extends string>(value: Value) => fc.constant(value);
const facts: fc.Arbitrary<IngredientFacts> = fc
  .oneof(
    fc.record({
      ...common,
      ...{ kind: constant('salt'), salt: fc.constantFrom(...saltSchema.options), assayPercent: number(1, 100) },
    }),
    fc.record({
      ...common,
      ...{ kind: constant('acid'), acid: fc.constantFrom(...acidSchema.options), strengthPercent: number(1, 100) },
    }),
    fc.record({
      ...{ ...common, kind: constant('tea'), tea: fc.constantFrom(...teaKindSchema.options) },
      ...{ form: fc.constantFrom(...leafFormSchema.options), caffeineMgPerG: nullable(number(0, 100)) },
    }),
    fc.record({ ...common, kind: constant('hops'), form: fc.constantFrom(...hopFormSchema.options) }),
    fc.record({ ...common, kind: constant('other') }),
  )
  .filter((one) => ingredientFactsSchema.safeParse(one).success);
const lots: fc.Arbitrary<LotFacts & { stockG: number }> = fc
  .record({
    ...{ code: text(1, 60), receivedOn: date, bestBefore: nullable(date), note: text(0, 400) },
    ...{ pricePerKg: nullable(number(0, 1e6)), stockG: number(0.001, 1e6) },
    hops: nullable(
      fc.record({
        ...{ alphaPercent: number(0, 30), oilMlPer100G: nullable(number(0, 10)) },
        ...{ harvestedOn: nullable(date), storageIndex: nullable(number(0.2, 2.5)) },
      }),
    ),
  })
  .filter(({ stockG: _, ...lot }) => lotFactsSchema.safeParse(lot).success);
