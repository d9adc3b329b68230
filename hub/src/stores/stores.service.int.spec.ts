import { Sequelize } from 'sequelize-typescript';
import type { Transaction } from 'sequelize';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildBatch, buildLot, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { inTransaction } from '../database/retry-transaction.js';
import { StockBook } from './stock-book.service.js';
import { StoresService } from './stores.service.js';

let testApp: TestApp;
let stores: StoresService;
let brewer: SignedInMember;
let lotId: string;
beforeAll(async () => {
  testApp = await createTestApp();
  stores = testApp.app.get(StoresService, { strict: false });
});
afterAll(() => testApp.close());
beforeEach(async () => {
  brewer = await signInAs(testApp, 'brewer');
  ({ id: lotId } = await buildLot(testApp, brewer, { code: 'C-24', massG: 100 }));
});

const run = <Result>(work: (transaction: Transaction) => Promise<Result>) =>
  inTransaction(testApp.app.get(Sequelize), work);
const planned = async () => (await buildBatch(testApp, { author: brewer })).batch;
const balance = async () => (await testApp.app.get(StockBook, { strict: false }).balances(brewer.house.id)).get(lotId);
const reserve = (batchId: string, massG: number, mayGoBelowZero = false) =>
  run((transaction) =>
    stores.reserve(
      brewer.house.id,
      batchId,
      [{ additionId: 'cascade', lotId, massG }],
      { mayGoBelowZero },
      transaction,
    ),
  );

describe(StoresService, () => {
  it('sets aside what is free, says what is short, and lets a person go below zero on purpose', async () => {
    await reserve((await planned()).id, 70);
    expect(await balance()).toEqual({ stockG: 100, reservedG: 70 });
    const late = await planned();
    await expect(reserve(late.id, 48)).rejects.toMatchObject({
      type: 'not-enough-stock',
      extras: { errors: [{ pointer: '/reserve/0/massG', detail: 'Lot C-24 has 30 g free.' }] },
    });
    await reserve(late.id, 48, true);
    expect(await balance()).toEqual({ stockG: 100, reservedG: 118 });
  });

  it('counts lines of one lot together', async () => {
    const { id } = await planned();
    const lines = ['cascade', 'late', 'late'].map((additionId) => ({ additionId, lotId, massG: 40.1 }));
    const asked = (part: typeof lines) =>
      run((transaction) => stores.reserve(brewer.house.id, id, part, { mayGoBelowZero: false }, transaction));
    await expect(asked(lines)).rejects.toMatchObject({ extras: { errors: [{ pointer: '/reserve/2/massG' }] } });
    await asked(lines.slice(1).map((line) => ({ ...line, massG: 0.1 })));
    expect(await stores.linesOf(brewer.house.id, id)).toEqual([
      expect.objectContaining({ additionId: 'late', lotId, code: 'C-24', massG: 0.2, state: 'reserved' }),
    ]);
  });

  it('gives the last of a lot to exactly one of two who plan at once', async () => {
    const batches = [await planned(), await planned(), await planned()];
    const results = await Promise.allSettled(batches.map(({ id }) => reserve(id, 100)));
    expect(results.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect(await balance()).toEqual({ stockG: 100, reservedG: 100 });
  });

  it('frees, and sets aside again what is still there', async () => {
    const { house } = brewer;
    const { id } = await planned();
    await reserve(id, 80);
    await run((transaction) => stores.release(house.id, id, transaction));
    expect(await balance()).toEqual({ stockG: 100, reservedG: 0 });
    expect(await stores.linesOf(house.id, id)).toEqual([]);
    await reserve((await planned()).id, 70);
    await run((transaction) => stores.reserveAgain(house.id, id, transaction));
    await run((transaction) => stores.reserveAgain(house.id, id, transaction));
    expect(await stores.linesOf(house.id, id)).toEqual([expect.objectContaining({ massG: 30, state: 'reserved' })]);
  });

  it('uses what was set aside, once, also below zero', async () => {
    const { id, batchNumber } = await planned();
    await reserve(id, 130, true);
    const use = () => run((transaction) => stores.useReserved(brewer.actor, { id, batchNumber }, transaction));
    await use();
    await use();
    expect(await balance()).toEqual({ stockG: -30, reservedG: 0 });
    expect(await stores.linesOf(brewer.house.id, id)).toEqual([
      expect.objectContaining({ additionId: 'cascade', massG: 130, state: 'used' }),
    ]);
  });

  it('knows no lot of another house', async () => {
    const stranger = await signInAs(testApp, 'brewer');
    const foreign = await buildLot(testApp, stranger, { massG: 100 });
    const { id } = await planned();
    const asked = run((transaction) =>
      stores.reserve(
        brewer.house.id,
        id,
        [{ additionId: 'cascade', lotId: foreign.id, massG: 1 }],
        { mayGoBelowZero: true },
        transaction,
      ),
    );
    await expect(asked).rejects.toMatchObject({
      type: 'not-valid',
      extras: { errors: [{ pointer: '/reserve/0/lotId' }] },
    });
    expect(await stores.linesOf(stranger.house.id, id)).toEqual([]);
  });
});
