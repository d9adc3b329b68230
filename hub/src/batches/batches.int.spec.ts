import type { Batch as BatchAnswer, BatchPlan, Ingredient, Recipe, RunSummary } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import { foldRun, type StoredRunEvent } from '@steepfall/shared/runs';
import { buildDocument } from '@steepfall/shared/testing';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  buildBatchParts,
  buildEquipment,
  buildEvent,
  buildLot,
  modelOf,
  signInAs,
  usualDocument,
  type SignedInMember,
} from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { AuditEntry } from '../audit/models/audit-entry.model.js';
import { newId } from '../common/ids.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterAll(() => testApp.close());

const post = (who: SignedInMember, body: object) =>
  request(testApp.url).post('/api/batches').set('authorization', who.bearer).send(body);
const get = (who: SignedInMember, path = '') =>
  request(testApp.url).get(`/api/batches${path}`).set('authorization', who.bearer);
const call = (method: 'get' | 'post' | 'patch' | 'delete', path: string, who = brewer) =>
  request(testApp.url)[method](`/api${path}`).set('authorization', who.bearer);
const plan = async (who = brewer, overrides: object = {}) =>
  (await post(who, { ...(await buildBatchParts(testApp, who)), ...overrides }).expect(201)).body as BatchAnswer;
const planOf = async ({ id }: BatchAnswer, who = brewer) =>
  (await get(who, `/${id}/plan`).expect(200)).body as BatchPlan;
/** What the stores say of a lot: in stock, and set aside. */
const held = async (lotId: string, who = brewer) => {
  const lots = ((await call('get', '/stores', who)).body as Ingredient[]).flatMap((ingredient) => ingredient.lots);
  const lot = lots.find(({ id }) => id === lotId);
  return [lot?.stockG, lot?.reservedG];
};
const numberOf = (response: request.Response) => (response.body as { batchNumber: string }).batchNumber;

describe('POST /api/batches', () => {
  it('needs a sign-in', async () => {
    expectProblem(await request(testApp.url).post('/api/batches').send({}), 'not-signed-in');
  });

  it('refuses what does not fit', async () => {
    const parts = await buildBatchParts(testApp, brewer);
    const response = await post(brewer, { ...parts, kegId: 'keg', plannedOn: '4 May' });
    expectProblem(response, 'not-valid', ['/kegId', '/plannedOn']);
  });

  it('refuses parts that are not there, of the wrong kind, removed, or of another house, all at once', async () => {
    const parts = await buildBatchParts(testApp, brewer);
    const elsewhere = await buildBatchParts(testApp, await signInAs(testApp, 'brewer'));
    const gone = await buildEquipment(testApp, brewer.house, 'keg');
    await gone.update({ removedAtMs: 1 });
    const response = await post(brewer, {
      ...parts,
      revisionId: elsewhere.revisionId,
      kettleId: elsewhere.kettleId,
      chillerId: parts.kettleId,
      kegId: gone.id,
      probeId: parts.kegId,
    });
    expectProblem(response, 'not-valid', ['/revisionId', '/kettleId', '/chillerId', '/kegId', '/probeId']);
  });

  it('plans a batch', async () => {
    const parts = await buildBatchParts(testApp, brewer);
    const response = await post(brewer, parts);
    expect(response.status).toBe(201);
    expect(response.body).toMatchObject({
      batchNumber: '26-001',
      revisionNumber: 1,
      plannedOn: '2026-05-04',
      status: 'planned',
      volumeL: 20,
      run: null,
    });
    const { id } = response.body as { id: string };
    expect((await get(brewer, `/${id}`)).body).toEqual(response.body);
    expect((await get(brewer)).body).toEqual([response.body]);
  });

  it('counts by house and year, and gives two people who plan at once two numbers', async () => {
    const house = await signInAs(testApp, 'owner');
    const parts = await buildBatchParts(testApp, house);
    const together = await Promise.all([1, 2, 3, 4, 5].map(() => post(house, { ...parts, chillerId: null })));
    expect(together.map(numberOf).sort()).toEqual(['26-001', '26-002', '26-003', '26-004', '26-005']);
    expect(numberOf(await post(house, { ...parts, plannedOn: '2027-01-01' }))).toBe('27-001');
    expect(numberOf(await post(house, { ...parts, plannedOn: '2026-12-31' }))).toBe('26-006');
    expect(
      ((await get(house)).body as { batchNumber: string }[]).map(({ batchNumber }) => batchNumber).slice(0, 3),
    ).toEqual(['27-001', '26-006', '26-005']);
  });
});

describe('GET /api/batches', () => {
  it('hides batches from a taster, who tastes blind, and from another house', async () => {
    const { body } = await post(brewer, await buildBatchParts(testApp, brewer));
    const { id } = body as { id: string };
    expectProblem(await get(await signInAs(testApp, 'taster', { house: brewer.house })), 'not-allowed');
    const stranger = await signInAs(testApp, 'owner');
    expect((await get(stranger)).body).toEqual([]);
    expectProblem(await get(stranger, `/${id}`), 'not-found');
  });
});

describe('a batch with lots set aside', () => {
  it('is planned with them or not at all', async () => {
    const house = await signInAs(testApp, 'brewer');
    const { id: lotId } = await buildLot(testApp, house, { massG: 150 });
    const parts = await buildBatchParts(testApp, house);
    const line = { additionId: 'sencha', lotId, massG: 100 };
    const batch = (await post(house, { ...parts, reserve: [line] }).expect(201)).body as BatchAnswer;
    expect(await held(lotId, house)).toEqual([150, 100]);
    expect(
      (await planOf(batch, house)).weighOut.map(({ additionId, massG, bag, lots }) => [
        additionId,
        massG,
        bag,
        lots.length,
      ]),
    ).toEqual([
      ['citric', 4, null, 0],
      ['sencha', 100, 'bag 1', 1],
      ['cascade', 60, 'bag 2', 0],
    ]);

    const greedy = { ...parts, reserve: [{ ...line, massG: 30 }, line] };
    expectProblem(await post(house, greedy), 'not-enough-stock', ['/reserve/1/massG']);
    expect((await get(house)).body).toHaveLength(1);
    await post(house, { ...greedy, mayGoBelowZero: true }).expect(201);
    expect(await held(lotId, house)).toEqual([150, 230]);
  });

  it('is refused at the line that does not fit', async () => {
    const parts = await buildBatchParts(testApp, brewer);
    const stranger = await signInAs(testApp, 'brewer');
    const { id: foreign } = await buildLot(testApp, stranger, { massG: 100 });
    const { id: lotId } = await buildLot(testApp, brewer, { massG: 100 });
    const line = { additionId: 'sencha', lotId, massG: 10 };
    const send = (...reserve: object[]) => post(brewer, { ...parts, reserve });
    expectProblem(await send(line, { ...line, lotId: foreign }), 'not-valid', ['/reserve/1/lotId']);
    expectProblem(await send({ ...line, additionId: 'oolong' }), 'not-valid', ['/reserve/0/additionId']);
    for (const massG of [-1, 0, 1e9, Number.NaN, 'ten'])
      expectProblem(await send({ ...line, massG }), 'not-valid', ['/reserve/0/massG']);
    expect(await held(lotId)).toEqual([100, 0]);
  });

  it('uses them when its run starts, once, and its plan says so', async () => {
    const { id: lotId } = await buildLot(testApp, brewer, { massG: 150 });
    const batch = await plan(brewer, { reserve: [{ additionId: 'sencha', lotId, massG: 100 }] });
    const run = (await call('post', `/batches/${batch.id}/runs`).expect(201)).body as RunSummary;
    expect(await held(lotId)).toEqual([50, 0]);
    const { weighOut } = await planOf(batch);
    expect(weighOut[1]?.lots).toMatchObject([{ lotId, massG: 100, state: 'used' }]);

    const ended = buildEvent(run, brewer, 'run.ended', { outcome: 'abandoned' });
    await call('post', `/runs/${run.id}/events`)
      .send({ events: [ended] })
      .expect(200);
    await call('post', `/batches/${batch.id}/runs`).expect(201);
    expect(await held(lotId)).toEqual([50, 0]);
  });

  it('uses them once, however many start its run at one instant', async () => {
    const { id: lotId } = await buildLot(testApp, brewer, { massG: 150 });
    const batch = await plan(brewer, { reserve: [{ additionId: 'sencha', lotId, massG: 100 }] });
    const answers = await Promise.all([1, 2, 3].map(() => call('post', `/batches/${batch.id}/runs`)));
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
    expect(await held(lotId)).toEqual([50, 0]);
  });
});

describe('PATCH /api/batches/:id/sheet', () => {
  const patch = ({ id }: BatchAnswer, body: object, who = brewer) =>
    call('patch', `/batches/${id}/sheet`, who).send(body);

  it('gives the batch a sheet of its own, which its run is brewed by', async () => {
    const batch = await plan();
    const { sheet, sheetVersion } = await planOf(batch);
    expect(sheetVersion).toBe(1);
    const title = `<b>Warm the keg</b> '; --`;
    const own = { ...sheet, steps: sheet.steps.map((step) => (step.id === 'check-kit' ? { ...step, title } : step)) };
    const changed = (await patch(batch, { sheet: own, sheetVersion }).expect(200)).body as BatchPlan;
    expect(changed).toEqual({ ...(await planOf(batch)), sheet: own, sheetVersion: 2 });
    expectProblem(await patch(batch, { sheet, sheetVersion }), 'changed-meanwhile');

    const run = (await call('post', `/batches/${batch.id}/runs`).expect(201)).body as RunSummary;
    const { events } = (await call('get', `/runs/${run.id}/events`)).body as { events: StoredRunEvent[] };
    expect(events[0]).toMatchObject({ type: 'run.started', payload: { revisionId: batch.revisionId } });
    expect(foldRun(events).sheet).toEqual(own);
    expectProblem(await patch(batch, { sheet, sheetVersion: 2 }), 'batch-not-planned');
  });

  it('takes one of two who change it at once', async () => {
    const batch = await plan();
    const { sheet } = await planOf(batch);
    const answers = await Promise.all([1, 2, 3].map(() => patch(batch, { sheet, sheetVersion: 1 })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409]);
    expect((await planOf(batch)).sheetVersion).toBe(2);
  });

  it('refuses a sheet that would not work on the day, at the step', async () => {
    const batch = await plan();
    const { sheet } = await planOf(batch);
    const placeOf = (id: string) => sheet.steps.findIndex((step) => step.id === id);
    const send = (steps: unknown[]) => patch(batch, { sheet: { ...sheet, steps }, sheetVersion: 1 });
    const swapped = sheet.steps.with(placeOf('tea-in'), sheet.steps[placeOf('tea-out')]!);
    const teaFirst = swapped.with(placeOf('tea-out'), sheet.steps[placeOf('tea-in')]!);
    const refused = await send(teaFirst);
    expectProblem(refused, 'not-valid');
    expect((refused.body as Problem).errors).toContainEqual(
      expect.objectContaining({ pointer: `/sheet/steps/${placeOf('tea-in')}` }),
    );
    const lost = await send(sheet.steps.filter(({ id }) => id !== 'tea-out'));
    expect((lost.body as Problem).errors).toContainEqual(
      expect.objectContaining({ pointer: `/sheet/steps/${placeOf('tea-in')}` }),
    );
    expect((await planOf(batch)).sheetVersion).toBe(1);
  });

  it('refuses what is no sheet, at the field, and whoever may not', async () => {
    const batch = await plan();
    const { sheet } = await planOf(batch);
    const send = (changes: object, who = brewer) =>
      patch(batch, { sheet: { ...sheet, ...changes }, sheetVersion: 1 }, who);
    expectProblem(await send({ steps: [] }), 'not-valid', ['/sheet/steps']);
    expectProblem(await send({ volumeL: 19 }), 'not-valid', ['/sheet/volumeL']);
    expectProblem(await send({ steps: [{ ...sheet.steps[0], reachS: -1 }] }), 'not-valid', ['/sheet/steps/0/reachS']);
    expectProblem(await send({ colour: 'green' }), 'not-valid', ['/sheet']);
    expectProblem(await patch(batch, { sheet }), 'not-valid', ['/sheetVersion']);
    expectProblem(await send({}, await signInAs(testApp, 'hand', { house: brewer.house })), 'not-allowed');
    expectProblem(await send({}, await signInAs(testApp, 'brewer')), 'not-found');
    expectProblem(await get(await signInAs(testApp, 'brewer'), `/${batch.id}/plan`), 'not-found');
    expect((await planOf(batch)).sheetVersion).toBe(1);
  });
});

describe('a revision that was followed by another', () => {
  it('stays the one of its batch, of its sheet and of its run', async () => {
    const batch = await plan();
    const next = { baseRevisionId: batch.revisionId, note: '', document: buildDocument({ steepC: 70, volumeL: 10 }) };
    const revised = (await call('post', `/recipes/${batch.recipeId}/revisions`).send(next).expect(201)).body as Recipe;
    expect(revised.latestRevisionNumber).toBe(2);
    await call('patch', `/recipes/${batch.recipeId}`).send({ isArchived: true }).expect(200);
    const run = (await call('post', `/batches/${batch.id}/runs`).expect(201)).body as RunSummary;
    const { events } = (await call('get', `/runs/${run.id}/events`)).body as { events: StoredRunEvent[] };
    expect(events[0]).toMatchObject({ payload: { revisionId: batch.revisionId } });
    expect(foldRun(events).sheet?.volumeL).toBe(usualDocument.volumeL);
    expect((await get(brewer, `/${batch.id}`)).body).toMatchObject({ revisionId: batch.revisionId, revisionNumber: 1 });
  });
});

describe('DELETE /api/batches/:id', () => {
  const cancel = ({ id }: { id: string }, who = brewer) => call('delete', `/batches/${id}`, who);
  const restore = ({ id }: { id: string }, who = brewer) => call('post', `/batches/${id}/restore`, who);
  const start = ({ id }: { id: string }) => call('post', `/batches/${id}/runs`);

  it('calls a planned batch off and gives its lots back; brought back, it takes what is still there', async () => {
    const house = await signInAs(testApp, 'brewer');
    const { id: lotId } = await buildLot(testApp, house, { massG: 150 });
    const line = { additionId: 'sencha', lotId, massG: 100 };
    const batch = await plan(house, { reserve: [line] });
    await cancel(batch, house).expect(204);
    expectProblem(await cancel(batch, house), 'batch-not-planned');
    expect(await held(lotId, house)).toEqual([150, 0]);
    expect((await get(house)).body).toEqual([]);
    expect((await get(house, '?cancelled=true')).body).toMatchObject([{ id: batch.id, status: 'cancelled' }]);
    expect((await get(house, `/${batch.id}`)).body).toMatchObject({ status: 'cancelled', run: null });

    const other = await plan(house, { reserve: [{ ...line, massG: 90 }] });
    expect(other.batchNumber).toBe('26-002');
    for (const _ of [1, 2]) expect((await restore(batch, house).expect(200)).body).toEqual(batch);
    expect(await held(lotId, house)).toEqual([150, 150]);
    expect((await get(house)).body).toHaveLength(2);
    const audited = await modelOf(testApp, AuditEntry).findAll({ where: { subject: batch.id }, order: ['seq'] });
    expect(audited.map(({ action }) => action)).toEqual(['batch.planned', 'batch.cancelled', 'batch.restored']);
  });

  it('lets no run begin on a cancelled batch, and cancels none that has begun', async () => {
    const batch = await plan();
    await cancel(batch).expect(204);
    expectProblem(await start(batch), 'batch-not-planned');
    await restore(batch).expect(200);
    const answers = await Promise.all([start(batch), cancel(batch)]);
    expect(answers.map(({ status }) => status).sort()).toSatisfy(
      ([first, second]: number[]) => (first === 201 || first === 204) && second === 409,
    );
    const begun = await plan();
    await start(begun).expect(201);
    expectProblem(await cancel(begun), 'batch-not-planned');
  });

  it('needs a sign-in, a batch of this house, and a role that plans', async () => {
    const batch = await plan();
    expectProblem(await request(testApp.url).delete(`/api/batches/${batch.id}`), 'not-signed-in');
    for (const act of [cancel, restore]) {
      expectProblem(await act(batch, await signInAs(testApp, 'hand', { house: brewer.house })), 'not-allowed');
      expectProblem(await act(batch, await signInAs(testApp, 'brewer')), 'not-found');
      expectProblem(await act({ id: newId() }), 'not-found');
    }
    expectProblem(await get(brewer, '?cancelled=perhaps'), 'not-valid', ['/cancelled']);
    expect((await get(brewer, `/${batch.id}`)).body).toEqual(batch);
  });
});
