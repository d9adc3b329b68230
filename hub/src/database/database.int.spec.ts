import { QueryTypes, type Model, type ModelStatic } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildHouse, modelOf } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { createThrowAwayDatabase, type ThrowAwayDatabase } from '../../test/database.js';
import { House } from '../houses/models/house.model.js';
import { migrateDatabase } from './migrate.js';
import { migrations } from './migrations/list.js';
import { inTransaction } from './retry-transaction.js';

describe(migrateDatabase, () => {
  let database: ThrowAwayDatabase;
  beforeAll(async () => {
    database = await createThrowAwayDatabase();
  });
  afterAll(() => database.drop());

  it('runs everything once, also when two hubs start together, and then nothing', async () => {
    const together = await Promise.all([migrateDatabase(database.url), migrateDatabase(database.url)]);
    expect(together.flat()).toEqual(migrations.map(({ name }) => name));
    expect(await migrateDatabase(database.url)).toEqual([]);
  });
});

describe('the database', () => {
  let testApp: TestApp;
  let sequelize: Sequelize;
  beforeAll(async () => {
    testApp = await createTestApp();
    sequelize = testApp.app.get(Sequelize);
  });
  afterAll(() => testApp.close());
  const select = <Row extends object>(sql: string) => sequelize.query<Row>(sql, { type: QueryTypes.SELECT });

  it('keeps every table in utf8mb4 and every id as plain bytes', async () => {
    const tables = await select<{ name: string; collation: string }>(
      'SELECT table_name AS name, table_collation AS collation FROM information_schema.tables WHERE table_schema = DATABASE()',
    );
    expect(tables.length).toBeGreaterThan(10);
    expect(tables.filter(({ collation }) => !collation.startsWith('utf8mb4'))).toEqual([]);
    const ids = await select<{ name: string; collation: string }>(
      `SELECT CONCAT(table_name, '.', column_name) AS name, collation_name AS collation FROM information_schema.columns
       WHERE table_schema = DATABASE() AND data_type = 'char'`,
    );
    expect(ids.filter(({ collation }) => collation !== 'ascii_bin')).toEqual([]);
  });

  it('has a column for every attribute of every model, and no attribute hides behind a class field', async () => {
    const columns = await select<{ name: string }>(
      `SELECT CONCAT(table_name, '.', column_name) AS name FROM information_schema.columns WHERE table_schema = DATABASE()`,
    );
    const known = new Set(columns.map(({ name }) => name));
    const models = Object.values(sequelize.models) as ModelStatic<Model>[];
    expect(models.length).toBeGreaterThan(8);
    for (const model of models) {
      const built = model.build({}) as unknown as object;
      for (const [attribute, { field }] of Object.entries(model.getAttributes())) {
        expect(known, `${model.name}.${attribute}`).toContain(`${String(model.getTableName())}.${field}`);
        expect(Object.hasOwn(built, attribute), `${model.name}.${attribute}`).toBe(false);
      }
    }
  });

  it('gives instants back as numbers, to the millisecond, and text with all its signs', async () => {
    for (const createdAtMs of [0, 1, 1_764_595_200_123, Number.MAX_SAFE_INTEGER]) {
      const { id } = await modelOf(testApp, House).create({
        id: crypto.randomUUID(),
        name: '茶 🍃',
        altitudeM: 0.1,
        createdAtMs,
      });
      const read = await modelOf(testApp, House).findByPk(id);
      expect(read).toMatchObject({ createdAtMs, name: '茶 🍃', altitudeM: 0.1, isDemo: false });
    }
  });

  it('refuses what does not fit a column rather than cutting it', async () => {
    await expect(buildHouse(testApp, { name: 'x'.repeat(81) })).rejects.toThrow('too long');
  });
});

describe(inTransaction, () => {
  let testApp: TestApp;
  beforeAll(async () => {
    testApp = await createTestApp();
  });
  afterAll(() => testApp.close());

  it('comes through a deadlock: both sides commit', async () => {
    const sequelize = testApp.app.get(Sequelize);
    const houses = modelOf(testApp, House);
    const [a, b] = [await buildHouse(testApp), await buildHouse(testApp)];
    let waiting = 0;
    let open: () => void = () => undefined;
    const bothHoldOne = new Promise<void>((resolve) => {
      open = resolve;
    });
    const climb = (first: House, second: House) =>
      inTransaction(sequelize, async (transaction) => {
        await houses.increment('version', { where: { id: first.id }, transaction });
        waiting += 1;
        if (waiting === 2) open();
        await bothHoldOne;
        await houses.increment('version', { where: { id: second.id }, transaction });
      });
    await Promise.all([climb(a, b), climb(b, a)]);
    expect(waiting).toBe(3);
    for (const { id } of [a, b]) expect((await houses.findByPk(id))?.version).toBe(3);
  });

  it('does not repeat what failed for another reason', async () => {
    let tries = 0;
    const work = inTransaction(testApp.app.get(Sequelize), () => {
      tries += 1;
      return Promise.reject(new Error('no'));
    });
    await expect(work).rejects.toThrow('no');
    expect(tries).toBe(1);
  });
});
