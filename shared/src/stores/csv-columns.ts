/** A column of the stores as a file: its head, what it means, and what a cell looks like. */
export interface StoresColumn {
  name: StoresColumnName;
  meaning: string;
  example: string;
  /** For which kinds of ingredient it is; all when left out. */
  for?: readonly string[];
}

export type StoresColumnName =
  | 'kind'
  | 'name'
  | 'what'
  | 'form'
  | 'strength %'
  | 'caffeine mg/g'
  | 'low stock'
  | 'allergens'
  | 'lot'
  | 'mass'
  | 'received on'
  | 'best before'
  | 'price per kg'
  | 'note'
  | 'alpha %'
  | 'oil mL/100 g'
  | 'harvested on'
  | 'storage index';

/** A row is a lot with its ingredient; without anything in the columns of the lot it is an ingredient alone. */
export const storesColumns: readonly StoresColumn[] = [
  { name: 'kind', meaning: 'tea, hops, salt, acid or other', example: 'tea' },
  { name: 'name', meaning: 'as the house calls it', example: 'sencha' },
  {
    name: 'what',
    meaning: 'which salt, which acid, or which kind of tea',
    example: 'green',
    for: ['salt', 'acid', 'tea'],
  },
  { name: 'form', meaning: 'how the leaf is cut, or pellets or cones', example: 'whole', for: ['tea', 'hops'] },
  {
    name: 'strength %',
    meaning: 'share of the jar that is the salt or the acid; a salt without it is pure',
    example: '80',
    for: ['salt', 'acid'],
  },
  { name: 'caffeine mg/g', meaning: 'when its maker or a laboratory tells it', example: '28', for: ['tea'] },
  { name: 'low stock', meaning: 'below this the stores say so; g unless kg, oz or lb is written', example: '100 g' },
  { name: 'allergens', meaning: 'as it stands on the packet', example: 'may contain nuts' },
  { name: 'lot', meaning: 'number of the lot, as printed on the packet', example: 'L-2203' },
  { name: 'mass', meaning: 'what there is of the lot; g unless kg, oz or lb is written', example: '1.5 kg' },
  { name: 'received on', meaning: 'year, month and day', example: '2026-03-14' },
  { name: 'best before', meaning: 'year, month and day', example: '2027-03-01' },
  { name: 'price per kg', meaning: 'in the money of the house', example: '42.50' },
  { name: 'note', meaning: 'anything to know of the lot', example: 'opened' },
  { name: 'alpha %', meaning: 'alpha acids at harvest', example: '6.5', for: ['hops'] },
  { name: 'oil mL/100 g', meaning: 'oil at harvest', example: '1.2', for: ['hops'] },
  { name: 'harvested on', meaning: 'year, month and day', example: '2025-09-01', for: ['hops'] },
  { name: 'storage index', meaning: 'of the hops, as a laboratory measured it', example: '0.31', for: ['hops'] },
];

/** What is the matter with a file before any row is read. */
export interface StoresCellProblem {
  column: string;
  detail: string;
}

export const columnKey = (name: string) => name.trim().toLowerCase();

/** Columns of a file that are needed and are not there, that nobody knows, or that are there twice. */
export function checkStoresHead(heads: readonly string[]): StoresCellProblem[] {
  const keys = heads.map(columnKey);
  const known = new Set(storesColumns.map(({ name }) => columnKey(name)));
  const missing = ['kind', 'name'].filter((name) => !keys.includes(name));
  return [
    ...missing.map((column) => ({ column, detail: `Add a column with the head "${column}".` })),
    ...heads.flatMap((column, index) => {
      const key = columnKey(column);
      if (key !== '' && !known.has(key)) {
        const names = storesColumns.map(({ name }) => name).join(', ');
        return [{ column, detail: `No column is called "${column}": take it out, or name it one of ${names}.` }];
      }
      return keys.indexOf(key) < index ? [{ column, detail: `Two columns are called "${column}": keep one.` }] : [];
    }),
  ];
}
