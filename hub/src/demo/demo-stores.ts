import type { RecipeDocument } from '@steepfall/shared/sheets';
import type { IngredientFacts, LotFacts } from '@steepfall/shared/stores';
import { columnsOf } from '../stores/present-stores.js';
import { demoHouse, demoId, demoMemberId } from './demo-house.js';
import type { Row, Tables } from './demo-rows.js';

const DAY_MS = 24 * 3_600_000;
const MINUTE_MS = 60_000;

interface DemoLot {
  key: string;
  code: string;
  receivedG: number;
  receivedDaysAgo: number;
  /** Negative: it is past it. */
  bestForDays?: number;
  pricePerKg: number;
  note?: string;
  hops?: { alphaPercent: number; oilMlPer100G: number; harvestedDaysAgo: number; storageIndex: number };
  /** What was done to it since, by hand. */
  since?: readonly { kind: 'used' | 'adjusted'; massG: number; reason: string }[];
}

interface DemoStock {
  key: string;
  facts: IngredientFacts;
  /** The first has the key of the ingredient: recipes and batches know it by that. */
  lots: readonly DemoLot[];
}

const quiet = { lowStockG: null, allergens: '' } as const;

/** Full jars and nearly empty ones, one past its date, one that only opens for the next batch: a shelf as it is. */
export const demoStock: readonly DemoStock[] = [
  {
    key: 'calcium-chloride',
    facts: {
      ...quiet,
      kind: 'salt',
      name: 'calcium chloride',
      salt: 'calciumChlorideDihydrate',
      assayPercent: 100,
      lowStockG: 50,
    },
    lots: [{ key: 'calcium-chloride', code: 'CC-0719', receivedG: 250, receivedDaysAgo: 160, pricePerKg: 9.5 }],
  },
  {
    key: 'gypsum',
    facts: { ...quiet, kind: 'salt', name: 'gypsum', salt: 'gypsum', assayPercent: 100, lowStockG: 50 },
    lots: [{ key: 'gypsum', code: 'GY-22', receivedG: 200, receivedDaysAgo: 160, pricePerKg: 6.2 }],
  },
  {
    key: 'bicarbonate',
    facts: { ...quiet, kind: 'salt', name: 'baking soda', salt: 'sodiumBicarbonate', assayPercent: 100 },
    lots: [{ key: 'bicarbonate', code: 'BS-5', receivedG: 500, receivedDaysAgo: 210, pricePerKg: 3.4 }],
  },
  {
    key: 'citric-acid',
    facts: {
      ...quiet,
      kind: 'acid',
      name: 'citric acid',
      acid: 'citricAnhydrous',
      strengthPercent: 100,
      lowStockG: 100,
    },
    lots: [
      {
        key: 'citric-acid',
        code: 'CA-3301',
        receivedG: 400,
        receivedDaysAgo: 90,
        bestForDays: 600,
        pricePerKg: 11,
      },
    ],
  },
  {
    key: 'lactic-acid',
    facts: { ...quiet, kind: 'acid', name: 'lactic acid', acid: 'lactic', strengthPercent: 80 },
    lots: [
      { key: 'lactic-acid', code: 'LA-808', receivedG: 120, receivedDaysAgo: 120, bestForDays: 300, pricePerKg: 18.5 },
    ],
  },
  {
    key: 'sencha',
    facts: {
      ...quiet,
      kind: 'tea',
      name: 'sencha',
      tea: 'green',
      form: 'whole',
      caffeineMgPerG: null,
      lowStockG: 150,
    },
    lots: [
      {
        key: 'sencha',
        code: 'S-1142',
        receivedG: 500,
        receivedDaysAgo: 40,
        bestForDays: 320,
        pricePerKg: 64,
        note: 'Second flush.',
      },
    ],
  },
  {
    key: 'oolong',
    facts: {
      ...quiet,
      kind: 'tea',
      name: 'oolong',
      tea: 'oolong',
      form: 'whole',
      caffeineMgPerG: null,
      lowStockG: 100,
    },
    lots: [
      {
        key: 'oolong',
        code: 'O-207',
        receivedG: 100,
        receivedDaysAgo: 70,
        bestForDays: 410,
        pricePerKg: 78,
        since: [
          { kind: 'used', massG: -30, reason: 'Steeped in a jug.' },
          { kind: 'adjusted', massG: -8, reason: 'Weighed the bag.' },
        ],
      },
    ],
  },
  {
    key: 'chamomile',
    facts: {
      ...quiet,
      kind: 'tea',
      name: 'chamomile',
      tea: 'herbal',
      form: 'broken',
      caffeineMgPerG: 0,
      lowStockG: 50,
      allergens: 'Of the daisy family.',
    },
    lots: [{ key: 'chamomile', code: 'CH-19', receivedG: 150, receivedDaysAgo: 70, bestForDays: 200, pricePerKg: 32 }],
  },
  {
    key: 'white-tea',
    facts: { ...quiet, kind: 'tea', name: 'white tea', tea: 'white', form: 'whole', caffeineMgPerG: null },
    lots: [{ key: 'white-tea', code: 'W-61', receivedG: 80, receivedDaysAgo: 380, bestForDays: -12, pricePerKg: 96 }],
  },
  {
    key: 'cascade',
    facts: { ...quiet, kind: 'hops', name: 'Cascade', form: 'pellets', lowStockG: 120 },
    lots: [
      {
        key: 'cascade',
        code: 'C-24-118',
        receivedG: 250,
        receivedDaysAgo: 60,
        bestForDays: 420,
        pricePerKg: 38.5,
        hops: { alphaPercent: 6.5, oilMlPer100G: 1.3, harvestedDaysAgo: 240, storageIndex: 0.3 },
      },
      {
        key: 'cascade-2',
        code: 'C-24-131',
        receivedG: 500,
        receivedDaysAgo: 20,
        bestForDays: 500,
        pricePerKg: 36,
        note: 'Not opened.',
        hops: { alphaPercent: 6.1, oilMlPer100G: 1.4, harvestedDaysAgo: 235, storageIndex: 0.28 },
      },
    ],
  },
  {
    key: 'saaz',
    facts: { ...quiet, kind: 'hops', name: 'Saaz', form: 'pellets', lowStockG: 60 },
    lots: [
      {
        key: 'saaz',
        code: 'Z-409',
        receivedG: 100,
        receivedDaysAgo: 60,
        bestForDays: 390,
        pricePerKg: 46,
        hops: { alphaPercent: 3.4, oilMlPer100G: 0.7, harvestedDaysAgo: 250, storageIndex: 0.32 },
      },
    ],
  },
  {
    key: 'hallertau',
    facts: { ...quiet, kind: 'hops', name: 'Hallertau', form: 'pellets', lowStockG: 100 },
    lots: [
      {
        key: 'hallertau',
        code: 'H-77',
        receivedG: 55,
        receivedDaysAgo: 300,
        bestForDays: 45,
        pricePerKg: 42,
        hops: { alphaPercent: 4.2, oilMlPer100G: 0.9, harvestedDaysAgo: 610, storageIndex: 0.44 },
      },
    ],
  },
  {
    key: 'orange-peel',
    facts: { ...quiet, kind: 'other', name: 'orange peel' },
    lots: [{ key: 'orange-peel', code: 'OP-3', receivedG: 60, receivedDaysAgo: 100, bestForDays: 150, pricePerKg: 24 }],
  },
];

export interface DemoStoresDay {
  nowMs: number;
  /** When the shelf was written into the book. */
  madeAtMs: number;
  /** The batch that was brewed from it. */
  brewed: { id: string; batchNumber: string; document: RecipeDocument; startedAtMs: number };
  localDate: (atMs: number) => string;
}

const owned = { house_id: demoHouse.id };

/** The shelf of the demo house: what came in, and what its finished batch took out. */
export function storesTables(day: DemoStoresDay): Tables {
  const lots = demoStock.flatMap(({ key, lots: ofIngredient }) =>
    ofIngredient.map((lot) => ({ ...lot, ingredientKey: key })),
  );
  return [
    [
      'ingredients',
      demoStock.map(({ key, facts }) => {
        const { kind, name, facts: rest } = columnsOf(facts);
        const row = { ...owned, id: demoId(`ingredient/${key}`), kind, name };
        return { ...row, facts: JSON.stringify(rest), created_at_ms: day.madeAtMs };
      }),
    ],
    ['lots', lots.map((lot) => lotRow(lot, lot.ingredientKey, day))],
    ['lot_moves', [...lots.flatMap((lot, index) => movesByHand(lot, index, day)), ...movesOfBatch(day)]],
  ];
}

function lotRow(lot: DemoLot, ingredientKey: string, { nowMs, madeAtMs, localDate }: DemoStoresDay): Row {
  const inDays = (days: number) => localDate(nowMs + days * DAY_MS);
  return {
    ...owned,
    id: demoId(`lot/${lot.key}`),
    ingredient_id: demoId(`ingredient/${ingredientKey}`),
    code: lot.code,
    received_on: inDays(-lot.receivedDaysAgo),
    best_before: lot.bestForDays === undefined ? null : inDays(lot.bestForDays),
    price_per_kg: lot.pricePerKg,
    note: lot.note ?? '',
    hops: lot.hops ? JSON.stringify(hopFacts(lot.hops, inDays)) : null,
    created_at_ms: madeAtMs,
  };
}

function hopFacts(
  { harvestedDaysAgo, ...rest }: NonNullable<DemoLot['hops']>,
  inDays: (days: number) => string,
): LotFacts['hops'] {
  return { ...rest, harvestedOn: inDays(-harvestedDaysAgo) };
}

const NO_BATCH = { batch_id: null, batch_number: null, addition_id: null };

function movesByHand({ key, receivedG, since = [] }: DemoLot, place: number, { madeAtMs }: DemoStoresDay): Row[] {
  const lines = [{ kind: 'received', massG: receivedG, reason: '' }, ...since];
  return lines.map(({ kind, massG, reason }, index) => ({
    ...owned,
    ...NO_BATCH,
    id: demoId(`lot-move/${key}/${index}`),
    lot_id: demoId(`lot/${key}`),
    kind,
    mass_g: massG,
    reason,
    at_ms: madeAtMs + (20 + place + index * 60) * MINUTE_MS,
    made_by: demoMemberId('brewer'),
  }));
}

/** Additions have the key of their lot. */
function movesOfBatch({ brewed }: DemoStoresDay): Row[] {
  return brewed.document.additions.map(({ id, massG }) => ({
    ...owned,
    id: demoId(`lot-move/brewed/${id}`),
    lot_id: demoId(`lot/${id}`),
    kind: 'used',
    mass_g: -massG,
    reason: '',
    batch_id: brewed.id,
    batch_number: brewed.batchNumber,
    addition_id: id,
    at_ms: brewed.startedAtMs,
    made_by: demoMemberId('brewer'),
  }));
}
