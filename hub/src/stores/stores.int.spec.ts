import type { Ingredient, LotMove } from '@steepfall/shared/contracts';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import request from 'supertest';
import { v7 } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { buildBatch, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { inTransaction } from '../database/retry-transaction.js';
import { StoresService } from './stores.service.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());
beforeEach(async () => {
  brewer = await signInAs(testApp, 'brewer');
});

type Method = 'get' | 'post' | 'patch' | 'delete';
const call = (method: Method, path = '', who: SignedInMember = brewer) =>
  request(testApp.url)[method](`/api/stores${path}`).set('authorization', who.bearer);

const cascade = { kind: 'hops', name: 'Cascade', form: 'pellets', lowStockG: 50, allergens: '' } as const;
const sencha = {
  kind: 'tea',
  name: 'Sencha',
  tea: 'green',
  form: 'whole',
  caffeineMgPerG: null,
  lowStockG: null,
  allergens: 'packed where nuts are packed',
} as const;
const delivery = {
  code: 'C-24',
  receivedOn: '2026-03-01',
  bestBefore: '2027-09-01',
  pricePerKg: 38.5,
  note: '',
  hops: { alphaPercent: 6.4, oilMlPer100G: 1.2, harvestedOn: '2025-09-04', storageIndex: 0.31 },
};

const add = async (facts: object = cascade): Promise<Ingredient> => {
  const { status, body } = await call('post', '/ingredients').send({ facts });
  expect(status).toBe(201);
  return body as Ingredient;
};
const receive = (id: string, facts: object = delivery, massG = 100) =>
  call('post', `/ingredients/${id}/lots`).send({ facts, massG });
const received = async (massG = 100) => {
  const { id } = await add();
  const { lots } = (await receive(id, delivery, massG)).body as Ingredient;
  return { id, lotId: lots[0]!.id };
};
const used = (lotId: string, massG: number, mayGoBelowZero = false, who = brewer) =>
  call('post', `/lots/${lotId}/moves`, who).send({ kind: 'used', massG, reason: 'tasting', mayGoBelowZero });
const counted = (lotId: string, toG: number) =>
  call('post', `/lots/${lotId}/moves`).send({ kind: 'counted', toG, reason: 'scale' });
const stockOf = (response: request.Response) => (response.body as Ingredient).stockG;
const movesOf = async (lotId: string) => (await call('get', `/lots/${lotId}/moves`)).body as LotMove[];
const actions = async () => {
  const rows = await testApp.app
    .get(Sequelize)
    .query<{ action: string }>('SELECT action FROM audit_log WHERE house_id = ? ORDER BY seq', {
      type: QueryTypes.SELECT,
      replacements: [brewer.house.id],
    });
  return rows.map(({ action }) => action);
};

describe('/api/stores', () => {
  it('needs a sign-in, and a right', async () => {
    expectProblem(await request(testApp.url).get('/api/stores'), 'not-signed-in');
    const { id, lotId } = await received();
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expect((await call('get', '', hand)).body).toHaveLength(1);
    expectProblem(await call('post', '/ingredients', hand).send({ facts: cascade }), 'not-allowed');
    expectProblem(await call('delete', `/ingredients/${id}`, hand), 'not-allowed');
    expectProblem(await used(lotId, 1, false, hand), 'not-allowed');
    expectProblem(await call('get', '', await signInAs(testApp, 'taster', { house: brewer.house })), 'not-allowed');
  });

  it('refuses what does not fit, at the field', async () => {
    const bad = { ...cascade, name: '  ', lowStockG: -1, form: 'dust' };
    expectProblem(await call('post', '/ingredients').send({ facts: bad }), 'not-valid', [
      '/facts/name',
      '/facts/lowStockG',
      '/facts/form',
    ]);
    const { id } = await add();
    const lot = { ...delivery, code: '', bestBefore: 'soon', pricePerKg: -3 };
    expectProblem(await receive(id, lot, 1e9), 'not-valid', [
      '/facts/code',
      '/facts/bestBefore',
      '/facts/pricePerKg',
      '/massG',
    ]);
    expectProblem(await receive(id, delivery, 0.0001), 'not-valid', ['/massG']);
    expectProblem(await receive((await add(sencha)).id), 'not-valid', ['/facts/hops']);
    expect(((await call('get')).body as Ingredient[]).flatMap(({ lots }) => lots)).toEqual([]);
  });

  it('adds, changes at a version, removes and brings back', async () => {
    const added = await add();
    expect(added).toEqual({
      id: expect.any(String),
      facts: cascade,
      stockG: 0,
      reservedG: 0,
      isLow: true,
      isRemoved: false,
      version: 1,
      lots: [],
    });
    const path = `/ingredients/${added.id}`;
    const change = { facts: { ...cascade, name: 'Cascade, US', lowStockG: null }, version: 1 };
    const changed = await call('patch', path).send(change);
    expect(changed.body).toMatchObject({ facts: change.facts, isLow: false, version: 2 });
    expectProblem(await call('patch', path).send(change), 'changed-meanwhile');
    expectProblem(await call('patch', path).send({ facts: sencha, version: 2 }), 'not-valid', ['/facts/kind']);
    await call('delete', path).expect(204);
    expectProblem(await call('delete', path), 'not-found');
    expect((await call('get')).body).toEqual([]);
    expect((await call('get', '?removed=true')).body).toMatchObject([{ id: added.id, isRemoved: true }]);
    expect((await call('post', `${path}/restore`)).body).toEqual(changed.body);
    expect((await call('post', `${path}/restore`)).body).toEqual(changed.body);
    expect(await actions()).toEqual([
      'ingredient.added',
      'ingredient.changed',
      'ingredient.removed',
      'ingredient.restored',
    ]);
  });

  it('keeps one name a kind, whatever the case, among what is not removed', async () => {
    const { id } = await add();
    const again = { facts: { ...cascade, name: 'CASCADE' } };
    expectProblem(await call('post', '/ingredients').send(again), 'already-exists', ['/facts/name']);
    await call('delete', `/ingredients/${id}`);
    await call('post', '/ingredients').send(again).expect(201);
    expectProblem(await call('post', `/ingredients/${id}/restore`), 'already-exists', ['/facts/name']);
  });

  it('puts the lot that must be used first at the head, and warns when the stock is low', async () => {
    const { id } = await add();
    await receive(id, { ...delivery, code: 'no date', bestBefore: null }, 20);
    await receive(id, { ...delivery, code: 'late', bestBefore: '2028-01-01' }, 10.1);
    const third = await receive(id, { ...delivery, code: 'soon', bestBefore: '2026-10-01' }, 20.2);
    const { lots, stockG, isLow } = third.body as Ingredient;
    expect(lots.map(({ code }) => code)).toEqual(['soon', 'late', 'no date']);
    expect(lots[0]).toMatchObject({ ...delivery, code: 'soon', bestBefore: '2026-10-01', stockG: 20.2, version: 1 });
    expect({ stockG, isLow }).toEqual({ stockG: 50.3, isLow: false });
    expect((await used(lots[0]!.id, 0.4)).body).toMatchObject({ stockG: 49.9, isLow: true });
  });

  it('changes a lot at a version; a removed one counts no more and can come back', async () => {
    const { id, lotId } = await received();
    const change = { facts: { ...delivery, pricePerKg: null, hops: null }, version: 1 };
    expect((await call('patch', `/lots/${lotId}`).send(change)).body).toMatchObject({
      lots: [{ pricePerKg: null, hops: null, version: 2 }],
    });
    expectProblem(await call('patch', `/lots/${lotId}`).send(change), 'changed-meanwhile');
    expectProblem(await receive(id, { ...delivery, code: 'c-24' }), 'already-exists', ['/facts/code']);
    await call('delete', `/lots/${lotId}`).expect(204);
    expectProblem(await call('delete', `/lots/${lotId}`), 'not-found');
    expect((await call('get')).body).toMatchObject([{ stockG: 0, lots: [{ stockG: 100, isRemoved: true }] }]);
    expectProblem(await used(lotId, 1), 'not-found');
    expect((await call('post', `/lots/${lotId}/restore`)).body).toMatchObject({ stockG: 100 });
  });
});

describe('the ledger of a lot', () => {
  it('sums exactly, and keeps who did what', async () => {
    const { lotId } = await received(0.3);
    expect(stockOf(await used(lotId, 0.1))).toBe(0.2);
    expect(stockOf(await used(lotId, 0.2))).toBe(0);
    expect(stockOf(await counted(lotId, 12.5))).toBe(12.5);
    expect(await movesOf(lotId)).toMatchObject([
      { kind: 'adjusted', massG: 12.5, reason: 'scale', by: 'A brewer', isUndone: false },
      { kind: 'used', massG: -0.2, reason: 'tasting', batchId: null, batchNumber: null },
      { kind: 'used', massG: -0.1 },
      { kind: 'received', massG: 0.3 },
    ]);
    expect((await actions()).slice(1)).toEqual(['lot.received', 'lot.used', 'lot.used', 'lot.counted']);
  });

  it('goes below zero only when a person says so', async () => {
    const { lotId } = await received(30);
    const refused = await used(lotId, 34);
    expectProblem(refused, 'not-enough-stock', ['/massG']);
    const { detail } = refused.body as { detail: string };
    expect(detail).toContain('holds 30 g');
    expect(detail).toContain('"mayGoBelowZero": true');
    expect(await movesOf(lotId)).toHaveLength(1);
    expect(stockOf(await used(lotId, 34, true))).toBe(-4);
    expect(stockOf(await counted(lotId, 0))).toBe(0);
  });

  it('gives the last 30 g to exactly one of those who want them at once', async () => {
    const { lotId } = await received(30);
    const together = await Promise.all([1, 2, 3, 4].map(() => used(lotId, 30)));
    expect(together.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409]);
    expect((await call('get')).body).toMatchObject([{ stockG: 0 }]);
  });

  it('takes a line back once, by a counter-line', async () => {
    const { lotId } = await received();
    await used(lotId, 40);
    const [line] = await movesOf(lotId);
    const together = await Promise.all([1, 2].map(() => call('delete', `/moves/${line!.id}`)));
    expect(together.map(({ status }) => status).sort()).toEqual([200, 409]);
    expectProblem(await call('delete', `/moves/${line!.id}`), 'nothing-to-undo');
    const [counter, undone] = await movesOf(lotId);
    expect([counter, undone]).toMatchObject([
      { kind: 'undone', massG: 40, isUndone: false },
      { kind: 'used', massG: -40, isUndone: true },
    ]);
    expectProblem(await call('delete', `/moves/${counter!.id}`), 'nothing-to-undo');
    expect((await call('get')).body).toMatchObject([{ stockG: 100 }]);
  });

  it('does not take a delivery back that was used since', async () => {
    const { lotId } = await received();
    await used(lotId, 40);
    const first = (await movesOf(lotId)).at(-1)!;
    expectProblem(await call('delete', `/moves/${first.id}`), 'not-enough-stock');
    expectProblem(await call('delete', `/moves/${v7()}`), 'not-found');
  });

  it('leaves the lines of a batch alone', async () => {
    const { lotId } = await received();
    const { batch } = await buildBatch(testApp, { author: brewer });
    const stores = testApp.app.get(StoresService, { strict: false });
    await inTransaction(testApp.app.get(Sequelize), async (transaction) => {
      const lines = [{ additionId: 'cascade', lotId, massG: 60 }];
      await stores.reserve(brewer.house.id, batch.id, lines, { mayGoBelowZero: false }, transaction);
    });
    expect((await call('get')).body).toMatchObject([{ stockG: 100, reservedG: 60, lots: [{ reservedG: 60 }] }]);
    await inTransaction(testApp.app.get(Sequelize), (transaction) =>
      stores.useReserved(brewer.actor, batch, transaction),
    );
    const [line] = await movesOf(lotId);
    expect(line).toMatchObject({ kind: 'used', massG: -60, batchId: batch.id, batchNumber: batch.batchNumber });
    expectProblem(await call('delete', `/moves/${line!.id}`), 'nothing-to-undo');
  });
});

describe('another house', () => {
  it('sees nothing and changes nothing', async () => {
    const { id, lotId } = await received();
    const [line] = await movesOf(lotId);
    const stranger = await signInAs(testApp, 'owner');
    expect((await call('get', '', stranger)).body).toEqual([]);
    const asked: [Method, string, object?][] = [
      ['patch', `/ingredients/${id}`, { facts: cascade, version: 1 }],
      ['delete', `/ingredients/${id}`],
      ['post', `/ingredients/${id}/restore`],
      ['post', `/ingredients/${id}/lots`, { facts: { ...delivery, code: 'X' }, massG: 1 }],
      ['patch', `/lots/${lotId}`, { facts: delivery, version: 1 }],
      ['delete', `/lots/${lotId}`],
      ['post', `/lots/${lotId}/restore`],
      ['get', `/lots/${lotId}/moves`],
      ['post', `/lots/${lotId}/moves`, { kind: 'counted', toG: 1, reason: '' }],
      ['delete', `/moves/${line!.id}`],
    ];
    for (const [method, path, body] of asked) expectProblem(await call(method, path, stranger).send(body), 'not-found');
    expect((await call('get')).body).toMatchObject([{ stockG: 100, lots: [{ isRemoved: false }] }]);
  });
});
