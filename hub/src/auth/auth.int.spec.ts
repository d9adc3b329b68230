import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildMember, signInAs } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';

describe('POST /api/auth/sign-in', () => {
  let testApp: TestApp;
  beforeAll(async () => {
    testApp = await createTestApp();
  });
  afterAll(() => testApp.close());

  it('refuses a body that does not fit, and names every field', async () => {
    const response = await request(testApp.url).post('/api/auth/sign-in').send({ email: 'nobody', extra: 1 });
    expect(response.status).toBe(422);
    expect(response.headers['content-type']).toContain('application/problem+json');
    expect(response.body).toMatchObject({ type: '/problems/not-valid', status: 422, instance: '/api/auth/sign-in' });
    expect(response.body.errors.map((error: { pointer: string }) => error.pointer)).toEqual([
      '/email',
      '/password',
      '',
    ]);
    expect(response.body.traceId).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('signs in', async () => {
    const { email, password, member, house } = await buildMember(testApp, { role: 'hand' });
    const response = await request(testApp.url)
      .post('/api/auth/sign-in')
      .send({ email: email.toUpperCase(), password });
    expect(response.body).toMatchObject({ member: { id: member.id, role: 'hand' }, house: { id: house.id } });
    const me = await request(testApp.url).get('/api/me').set('authorization', `Bearer ${response.body.accessToken}`);
    expect(me.body).toEqual({ member: response.body.member, house: response.body.house });
  });

  it('knows who asks', async () => {
    const { bearer, member } = await signInAs(testApp, 'taster');
    const me = await request(testApp.url).get('/api/me').set('authorization', bearer);
    expect(me.body.member.id).toBe(member.id);
  });
});
