import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { modelOf, signInAs } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { AuditEntry } from '../audit/models/audit-entry.model.js';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());

const patch = (bearer: string, body: object) =>
  request(testApp.url).patch('/api/house').set('authorization', bearer).send(body);

describe('/api/house', () => {
  it('needs a sign-in, and an owner to change it', async () => {
    expectProblem(await request(testApp.url).get('/api/house'), 'not-signed-in');
    const { bearer } = await signInAs(testApp, 'brewer');
    expectProblem(await patch(bearer, { name: 'X', altitudeM: 0, currency: 'EUR', version: 1 }), 'not-allowed');
  });

  it('refuses what does not fit', async () => {
    const { bearer } = await signInAs(testApp, 'owner');
    const response = await patch(bearer, { name: 'x'.repeat(81), altitudeM: 1e9, currency: 'euro' });
    expectProblem(response, 'not-valid', ['/name', '/altitudeM', '/currency', '/version']);
  });

  it('changes it once for one version, and writes down who did', async () => {
    const { bearer, house, member } = await signInAs(testApp, 'owner');
    const body = { name: 'Blue Gate 🍃', altitudeM: 840.5, currency: 'NOK', version: 1 };
    const changed = await patch(bearer, body);
    expect(changed.body).toEqual({ id: house.id, ...body, version: 2 });
    expectProblem(await patch(bearer, body), 'changed-meanwhile');
    const read = await request(testApp.url).get('/api/house').set('authorization', bearer);
    expect(read.body).toEqual(changed.body);
    const entries = await modelOf(testApp, AuditEntry).findAll({ where: { houseId: house.id } });
    expect(entries).toHaveLength(1);
    expect(entries[0]).toMatchObject({ action: 'house.changed', memberId: member.id, facts: { altitudeM: 840.5 } });
  });
});
