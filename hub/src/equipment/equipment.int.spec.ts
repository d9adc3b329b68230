import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildEquipment, signInAs, usualEquipmentOf, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';

let testApp: TestApp;
let brewer: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  brewer = await signInAs(testApp, 'brewer');
});
afterAll(() => testApp.close());

const call = (method: 'get' | 'post' | 'patch' | 'delete', path = '', who: SignedInMember = brewer) =>
  request(testApp.url)[method](`/api/equipment${path}`).set('authorization', who.bearer);
const keg = usualEquipmentOf('keg');

describe('/api/equipment', () => {
  it('needs a sign-in', async () => {
    for (const method of ['get', 'post'] as const)
      expectProblem(await request(testApp.url)[method]('/api/equipment'), 'not-signed-in');
  });

  it('refuses facts that do not fit the kind', async () => {
    const kettle = { kind: 'kettle', name: 'Kettle', facts: { ...keg.facts, volumeL: -1 } };
    const response = await call('post').send(kettle);
    expectProblem(response, 'not-valid');
    const { errors } = response.body as { errors: { pointer: string }[] };
    expect(errors.map(({ pointer }) => pointer)).toEqual(
      expect.arrayContaining(['/facts/volumeL', '/facts/diameterM', '/facts/heaterEfficiency', '/facts']),
    );
    expectProblem(await call('post').send({ kind: 'spoon', name: 'Spoon', facts: {} }), 'not-valid', ['/kind']);
  });

  it('adds, changes at a version, and refuses the old version', async () => {
    const created = await call('post').send(keg);
    expect(created.status).toBe(201);
    expect(created.body).toEqual({ id: expect.any(String), ...keg, version: 1 });
    const { id } = created.body as { id: string };
    const change = { ...keg, name: 'Tall keg', facts: { ...keg.facts, tareG: 4210.5 }, version: 1 };
    const changed = await call('patch', `/${id}`).send(change);
    expect(changed.body).toEqual({ id, ...change, version: 2 });
    expectProblem(await call('patch', `/${id}`).send(change), 'changed-meanwhile');
    for (const massG of [Number.NaN, 1e9, '4200', null])
      expectProblem(
        await call('patch', `/${id}`).send({ ...change, facts: { ...keg.facts, tareG: massG }, version: 2 }),
        'not-valid',
        ['/facts/tareG'],
      );
    const chiller = { ...usualEquipmentOf('chiller'), version: 2 };
    expectProblem(await call('patch', `/${id}`).send(chiller), 'not-valid', ['/kind']);
    expect((await call('get')).body).toContainEqual(changed.body);
  });

  it('removes from the list, once', async () => {
    const { id } = await buildEquipment(testApp, brewer.house, 'kettle');
    await call('delete', `/${id}`).expect(204);
    expectProblem(await call('delete', `/${id}`), 'not-found');
    expect((await call('get')).body).not.toContainEqual(expect.objectContaining({ id }));
    expect((await call('get', '?removed=true')).body).toContainEqual(expect.objectContaining({ id }));
    const { bearer } = await signInAs(testApp, 'brewer');
    const elsewhere = await request(testApp.url).get('/api/equipment?removed=true').set('authorization', bearer);
    expect(elsewhere.body).toEqual([]);
    expectProblem(await call('get', '?removed=perhaps'), 'not-valid');
  });

  it('brings back what was removed, as it was, twice the same way', async () => {
    const created = await call('post').send({
      kind: 'scale',
      name: 'Small scale',
      facts: { resolutionG: 0.1, capacityG: 2000 },
    });
    const { id } = created.body as { id: string };
    await call('delete', `/${id}`).expect(204);
    for (let n = 0; n < 2; n += 1) {
      const restored = await call('post', `/${id}/restore`);
      expect(restored.status).toBe(200);
      expect(restored.body).toEqual(created.body);
    }
    expect((await call('get')).body).toContainEqual(created.body);
    const hand = await signInAs(testApp, 'hand', { house: brewer.house });
    expectProblem(await call('post', `/${id}/restore`, hand), 'not-allowed');
    expectProblem(await call('post', `/${id}/restore`, await signInAs(testApp, 'owner')), 'not-found');
  });

  it('hides what belongs to another house', async () => {
    const stranger = await signInAs(testApp, 'owner');
    const { id } = await buildEquipment(testApp, brewer.house, 'keg');
    expect((await call('get', '', stranger)).body).toEqual([]);
    expectProblem(await call('patch', `/${id}`, stranger).send({ ...keg, version: 1 }), 'not-found');
    expectProblem(await call('delete', `/${id}`, stranger), 'not-found');
  });
});
