import { createMemberSchema } from '@steepfall/shared/contracts';
import { foldRun, runEventSchema, type RunEvent } from '@steepfall/shared/runs';
import { checkSheet, compileSheet, recipeDocumentSchema } from '@steepfall/shared/sheets';
import { beforeAll, describe, expect, it } from 'vitest';
import { demoHouse, demoId, demoSignIns } from './demo-house.js';
import { demoRecipes } from './demo-recipes.js';
import { demoTables, localDate, type Row, type Tables } from './demo-rows.js';

const NOW_MS = new Date(2026, 4, 20, 7, 30).getTime();

function eventsOf(tables: Tables): RunEvent[] {
  const rows = new Map(tables).get('run_events') ?? [];
  return rows.map((row) =>
    runEventSchema.parse({
      id: row['id'],
      runId: row['run_id'],
      type: row['type'],
      v: row['v'],
      atMs: row['at_ms'],
      by: row['by'],
      station: row['station'],
      payload: JSON.parse(String(row['payload'])) as unknown,
    }),
  );
}

describe(demoTables, () => {
  let tables: Tables;
  let events: RunEvent[];
  const rowsOf = (table: string): Row[] => new Map(tables).get(table) ?? [];
  beforeAll(async () => {
    tables = await demoTables(NOW_MS);
    events = eventsOf(tables);
  });

  it('holds what the contracts ask of everybody else', () => {
    for (const { document } of demoRecipes.flatMap(({ revisions }) => revisions))
      expect(recipeDocumentSchema.parse(document)).toEqual(document);
    for (const member of demoSignIns) expect(createMemberSchema.parse(member)).toEqual(member);
  });

  it('has recipes of which a sheet can be made, each revision another than the one before', () => {
    for (const { revisions } of demoRecipes) {
      const documents = revisions.map(({ document }) => document);
      for (const document of documents)
        expect(checkSheet(compileSheet(document, { altitudeM: demoHouse.altitudeM, reachS: 10 }))).toEqual([]);
      expect(new Set(documents.map((document) => JSON.stringify(document))).size).toBe(documents.length);
    }
    const saved = rowsOf('recipe_revisions').map((row) => Number(row['created_at_ms']));
    expect(saved.every((atMs) => atMs < NOW_MS)).toBe(true);
  });

  it('tells a day that went to its end without a clash', () => {
    const state = foldRun(events);
    expect(state).toMatchObject({ status: 'ended', outcome: 'finished', conflicts: [], unknownCount: 0 });
    expect(state.steps.every(({ status }) => status === 'done')).toBe(true);
    expect(state.undoneEventIds).toHaveLength(1);
    expect(state.measurements.map(({ quantity }) => quantity)).toEqual(['pH', 'pH', 'pressureKPa', 'tasteScore']);
  });

  it('catches the hops on the fall: warned in order, each stage once, in at the target', () => {
    const raised = events.filter((event) => event.type === 'alert.raised' && event.payload.key === 'hops-in');
    expect(raised.map((event) => (event.type === 'alert.raised' ? event.payload.stage : ''))).toEqual([
      'coming-up',
      'stand-by',
      'now',
    ]);
    const caught = foldRun(events).steps.find(({ step }) => step.id === 'hops-in');
    expect(Math.abs((caught?.tempC ?? 0) - 62)).toBeLessThan(1);
  });

  it('records a curve that rises to the steep and falls to the transfer, then stops', () => {
    const readings = rowsOf('readings');
    const temps = readings.map((row) => Number(row['temp_c']));
    expect(Math.max(...temps)).toBeGreaterThan(76);
    expect(Math.max(...temps)).toBeLessThan(79);
    expect(temps.at(-1)).toBeLessThan(21);
    expect(new Set(readings.map((row) => row['at_ms'])).size).toBe(readings.length);
    expect(rowsOf('runs')[0]).toMatchObject({ last_seq: events.length, ended_at_ms: events.at(-1)?.atMs });
  });

  it('is the same day each time it is made', async () => {
    const again = await demoTables(NOW_MS);
    const unsalted = (from: Tables) => from.filter(([table]) => table !== 'users');
    expect(unsalted(again)).toEqual(unsalted(tables));
  });

  it('plans a batch for today and numbers by the year', async () => {
    expect(rowsOf('batches').map((row) => [row['batch_number'], row['planned_on']])).toEqual([
      ['26-001', '2026-05-15'],
      ['26-002', '2026-05-20'],
    ]);
    const newYear = new Map(await demoTables(new Date(2027, 0, 2, 9).getTime())).get('batches');
    expect(newYear?.map((row) => row['batch_number'])).toEqual(['26-001', '27-001']);
    expect(localDate(new Date(2027, 0, 2, 23, 59).getTime())).toBe('2027-01-02');
  });

  it('keeps its ids', () => {
    expect(demoId('house')).toBe('755497a2-eeaa-5c53-8718-4b8b63b5fa55');
  });
});
