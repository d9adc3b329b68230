import { useMemo, useState } from 'react';
import { createColumnHelper } from '@tanstack/react-table';
import type { Ingredient } from '@steepfall/shared/contracts';
import type { IngredientKind } from '@steepfall/shared/sheets';
import { formatMass } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Link } from 'react-router-dom';
import { Button } from '#components/button.tsx';
import { DataTable } from '#components/data-table.tsx';
import { TextField } from '#components/field.tsx';
import { Segmented } from '#components/segmented.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { useListTable } from '#components/use-list-table.ts';
import { priceMass, useMoney } from '#lib/money.ts';
import { useUnits } from '#lib/units.ts';
import { localDate } from '#lib/words.ts';
import { factsWords, kindWords } from './facts-words.ts';
import { firstBestBefore, marksOf, nextPricePerKg, type StockMark } from './stock-marks.ts';

type KindChoice = IngredientKind | 'all';
const kindChoices: { value: KindChoice; label: string }[] = [
  { value: 'all', label: 'All' },
  { value: 'tea', label: 'Tea' },
  { value: 'hops', label: 'Hops' },
  { value: 'salt', label: 'Salts' },
  { value: 'acid', label: 'Acids' },
  { value: 'other', label: 'Other' },
];

/** A row as it is read: everything that is sorted or searched is worked out once. */
interface Row {
  ingredient: Ingredient;
  name: string;
  kind: IngredientKind;
  marks: StockMark[];
  stockG: number;
  reservedG: number;
  freeG: number;
  bestBefore: string;
  pricePerKg: number | undefined;
  words: string;
}

function rowOf(ingredient: Ingredient, today: string): Row {
  const { facts, lots, stockG, reservedG } = ingredient;
  return {
    ingredient,
    name: facts.name,
    kind: facts.kind,
    marks: marksOf(ingredient, today),
    stockG,
    reservedG,
    freeG: stockG - reservedG,
    bestBefore: firstBestBefore(lots) ?? '',
    pricePerKg: nextPricePerKg(lots) ?? undefined,
    words: [facts.name, kindWords[facts.kind], factsWords(facts), ...lots.map(({ code }) => code)]
      .join(' ')
      .toLowerCase(),
  };
}

const column = createColumnHelper<Row>();

function useColumns(onReceive: ((ingredient: Ingredient) => void) | null) {
  const { mass: unit } = useUnits();
  const money = useMoney();
  return useMemo(() => {
    const { word, massKg } = priceMass[unit];
    const mass = (id: 'stockG' | 'reservedG' | 'freeG', header: string) =>
      column.accessor(id, {
        header,
        meta: { isNumber: true },
        sortDescFirst: false,
        cell: ({ getValue }) => <span className="whitespace-nowrap">{formatMass(getValue(), { unit })}</span>,
      });
    return [
      column.accessor('name', {
        header: 'Name',
        sortingFn: 'text',
        meta: { isLead: true },
        cell: ({ row: { original } }) => <NameCell row={original} />,
      }),
      column.accessor('kind', {
        header: 'Kind',
        filterFn: 'equalsString',
        cell: ({ getValue }) => kindWords[getValue()],
      }),
      mass('stockG', 'In stock'),
      mass('reservedG', 'Set aside'),
      mass('freeG', 'Free'),
      column.accessor('bestBefore', {
        header: 'Best before',
        sortingFn: (a, b) => (a.original.bestBefore || '9999').localeCompare(b.original.bestBefore || '9999'),
        cell: ({ getValue }) => (
          <span className="whitespace-nowrap tabular-nums">
            {getValue() ? format(localDate(getValue()), 'd MMM yyyy') : ''}
          </span>
        ),
      }),
      column.accessor('pricePerKg', {
        header: `Price a ${word}`,
        meta: { isNumber: true, from: 'lg' },
        sortUndefined: 'last',
        cell: ({ getValue }) => {
          const price = getValue();
          return <span className="whitespace-nowrap">{price === undefined ? 'not known' : money(price * massKg)}</span>;
        },
      }),
      ...(onReceive
        ? [
            column.display({
              id: 'receive',
              meta: { from: 'xl' },
              header: () => <span className="sr-only">Receive</span>,
              cell: ({ row: { original } }) => (
                <Button look="quiet" className="-mr-5" onClick={() => onReceive(original.ingredient)}>
                  Receive<span className="sr-only"> {original.name}</span>
                </Button>
              ),
            }),
          ]
        : []),
    ];
  }, [unit, money, onReceive]);
}

function NameCell({ row: { ingredient, name, marks } }: { row: Row }) {
  return (
    <span className="flex flex-wrap items-center gap-x-5">
      <Link
        to={`/stores/${ingredient.id}`}
        className="inline-flex min-h-12 items-center font-semibold underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
      >
        {name}
      </Link>
      {marks.map(({ word, shape, tone }) => (
        <StatusChip key={word} shape={shape} tone={tone} className="text-note">
          {word}
        </StatusChip>
      ))}
    </span>
  );
}

interface StoresTableProps {
  ingredients: readonly Ingredient[];
  onReceive: ((ingredient: Ingredient) => void) | null;
}

export function StoresTable({ ingredients, onReceive }: StoresTableProps) {
  const [kind, setKind] = useState<KindChoice>('all');
  const today = format(new Date(), 'yyyy-MM-dd');
  const rows = useMemo(() => ingredients.map((each) => rowOf(each, today)), [ingredients, today]);
  const columns = useColumns(onReceive);
  const { table, words, setWords } = useListTable({
    data: rows,
    columns,
    orderAtFirst: [{ id: 'name', desc: false }],
    only: kind === 'all' ? null : { id: 'kind', value: kind },
    // Lot numbers and facts are found too, though they have no column.
    globalFilterFn: ({ original }, _, looked: string) =>
      looked
        .toLowerCase()
        .split(/\s+/)
        .every((word) => original.words.includes(word)),
    getColumnCanGlobalFilter: ({ id }) => id === 'name',
  });
  return (
    <div className="grid gap-6">
      <div className="flex flex-wrap items-end gap-x-8 gap-y-5">
        <div className="w-full max-w-sm">
          <TextField
            label="Find"
            type="search"
            placeholder="name, kind or lot number"
            value={words}
            onChange={({ target }) => setWords(target.value)}
          />
        </div>
        <Segmented label="Kind" value={kind} onChange={setKind} segments={kindChoices} />
      </div>
      {table.getRowModel().rows.length > 0 ? (
        <DataTable table={table} caption="Ingredients in the stores" countWord="ingredients" />
      ) : (
        <p role="status" className="py-6 text-lead text-soft">
          Nothing fits. Take a word out, or look in all kinds.
        </p>
      )}
    </div>
  );
}
