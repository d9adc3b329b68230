import { ingredientFactsSchema, lotFactsSchema, stockG } from '@steepfall/shared/stores';
import { beforeAll, describe, expect, it } from 'vitest';
import { demoId } from './demo-house.js';
import { demoRecipes, senchaRecipe } from './demo-recipes.js';
import { demoTables, localDate, type Row } from './demo-rows.js';
import { demoStock } from './demo-stores.js';

const NOW_MS = new Date(2026, 4, 20, 7, 30).getTime();

describe('the stores of the demo house', () => {
  let rowsOf: (table: string) => Row[];
  beforeAll(async () => {
    const tables = new Map(await demoTables(NOW_MS));
    rowsOf = (table) => tables.get(table) ?? [];
  });
  const stockOf = (lotKey: string) =>
    stockG(
      rowsOf('lot_moves')
        .filter((row) => row['lot_id'] === demoId(`lot/${lotKey}`))
        .map((row) => ({ massG: Number(row['mass_g']) })),
    );

  it('hold what the contracts ask of everybody else', () => {
    for (const { facts } of demoStock) expect(ingredientFactsSchema.parse(facts)).toEqual(facts);
    for (const row of rowsOf('lots')) {
      const hops = row['hops'] === null ? null : (JSON.parse(String(row['hops'])) as unknown);
      const facts = {
        code: row['code'],
        receivedOn: row['received_on'],
        bestBefore: row['best_before'],
        pricePerKg: row['price_per_kg'],
        note: row['note'],
        hops,
      };
      expect(lotFactsSchema.parse(facts)).toEqual(facts);
    }
  });

  it('have every ingredient that a recipe names', () => {
    const ids = new Set(rowsOf('ingredients').map((row) => row['id']));
    const named = demoRecipes.flatMap(({ revisions }) => revisions.flatMap(({ document }) => document.additions));
    for (const { ingredientId, name } of named) expect(ids, name).toContain(ingredientId);
  });

  it('lost to the finished batch what it took, and never fell below zero', () => {
    const { additions } = senchaRecipe.revisions[0].document;
    const taken = rowsOf('lot_moves').filter((row) => row['batch_id'] === demoId('batch/brewed'));
    expect(taken.map((row) => [row['addition_id'], row['mass_g']])).toEqual(
      additions.map(({ id, massG }) => [id, -massG]),
    );
    for (const { lots } of demoStock) for (const { key } of lots) expect(stockOf(key), key).toBeGreaterThan(0);
    expect([stockOf('sencha'), stockOf('cascade'), stockOf('oolong')]).toEqual([390, 190, 62]);
  });

  it('run low somewhere, and are past a date somewhere', () => {
    const low = demoStock.filter(
      ({ facts, lots }) => lots.reduce((sum, { key }) => sum + stockOf(key), 0) < (facts.lowStockG ?? 0),
    );
    expect(low.map(({ key }) => key)).toEqual(['oolong', 'hallertau']);
    const today = localDate(NOW_MS);
    const past = rowsOf('lots').filter((row) => row['best_before'] !== null && String(row['best_before']) < today);
    expect(past.map((row) => row['code'])).toEqual(['W-61']);
  });
});
