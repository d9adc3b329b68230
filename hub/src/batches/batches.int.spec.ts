import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildBatchParts, buildEquipment, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';

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
