import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildHouse, signInAs, type SignedInMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { User } from './models/user.model.js';
import { modelOf } from '../../test/builders.js';

let testApp: TestApp;
let owner: SignedInMember;
beforeAll(async () => {
  testApp = await createTestApp();
  owner = await signInAs(testApp, 'owner');
});
afterAll(() => testApp.close());

const get = (who: SignedInMember) => request(testApp.url).get('/api/members').set('authorization', who.bearer);
const post = (who: SignedInMember, body: object) =>
  request(testApp.url).post('/api/members').set('authorization', who.bearer).send(body);
const patch = (who: SignedInMember, id: string, body: object) =>
  request(testApp.url).patch(`/api/members/${id}`).set('authorization', who.bearer).send(body);
const newMember = (email: string) => ({
  displayName: 'Hand',
  email,
  role: 'hand',
  password: 'twelve letters and more',
});

describe('GET /api/members', () => {
  it('needs a sign-in, and lists this house only', async () => {
    expectProblem(await request(testApp.url).get('/api/members'), 'not-signed-in');
    const stranger = await signInAs(testApp, 'owner');
    const listed = (await get(stranger)).body as { id: string }[];
    expect(listed.map(({ id }) => id)).toEqual([stranger.member.id]);
  });
});

describe('POST /api/members', () => {
  it('is for owners', async () => {
    const brewer = await signInAs(testApp, 'brewer', { house: owner.house });
    expectProblem(await request(testApp.url).post('/api/members').send(newMember('x@house.example')), 'not-signed-in');
    expectProblem(await post(brewer, newMember('x@house.example')), 'not-allowed');
  });

  it('refuses what does not fit', async () => {
    const response = await post(owner, { displayName: ' ', email: 'x', role: 'king', password: 'short' });
    expectProblem(response, 'not-valid', ['/displayName', '/email', '/role', '/password']);
  });

  it('adds a member who can sign in, once', async () => {
    const body = newMember('New.Hand@house.example');
    const response = await post(owner, body);
    expect(response.status).toBe(201);
    expect(response.body).toMatchObject({
      displayName: 'Hand',
      email: 'new.hand@house.example',
      role: 'hand',
      isActive: true,
    });
    const { email, password } = body;
    await request(testApp.url).post('/api/auth/sign-in').send({ email, password }).expect(200);
    const stored = await modelOf(testApp, User).findOne({ where: { email: 'new.hand@house.example' } });
    expect(stored?.passwordHash).toMatch(/^\$argon2id\$/);
    expectProblem(await post(owner, body), 'already-exists');
  });

  it('does not touch an account of another house', async () => {
    const stranger = await signInAs(testApp, 'brewer');
    expectProblem(await post(owner, { ...newMember(stranger.email), role: 'owner' }), 'already-exists');
    const { email, password } = stranger;
    await request(testApp.url).post('/api/auth/sign-in').send({ email, password }).expect(200);
  });
});

describe('PATCH /api/members/:id', () => {
  it('does not find members of another house, nor what is no id', async () => {
    const stranger = await signInAs(testApp, 'hand');
    expectProblem(await patch(owner, stranger.member.id, { role: 'taster' }), 'not-found');
    expectProblem(await patch(owner, 'first', { role: 'taster' }), 'not-found');
  });

  it('changes a role, twice the same way', async () => {
    const hand = await signInAs(testApp, 'hand', { house: owner.house });
    for (let n = 0; n < 2; n += 1) {
      const response = await patch(owner, hand.member.id, { role: 'brewer' });
      expect(response.body).toMatchObject({ id: hand.member.id, role: 'brewer' });
    }
  });

  it('takes a member out: sessions end at once', async () => {
    const hand = await signInAs(testApp, 'hand', { house: owner.house });
    await request(testApp.url).get('/api/me').set('authorization', hand.bearer).expect(200);
    expect((await patch(owner, hand.member.id, { isActive: false })).body).toMatchObject({ isActive: false });
    expectProblem(await request(testApp.url).get('/api/me').set('authorization', hand.bearer), 'session-expired');
  });

  it('keeps one owner, also when two step down at the same moment', async () => {
    const house = await buildHouse(testApp);
    const [first, second] = [await signInAs(testApp, 'owner', { house }), await signInAs(testApp, 'owner', { house })];
    const both = await Promise.all([
      patch(first, first.member.id, { role: 'hand' }),
      patch(second, second.member.id, { isActive: false }),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    expectProblem(
      both.find(({ status }) => status === 409)!,
      'last-owner',
    );
  });
});

describe('PATCH /api/me/units', () => {
  const units = { temperature: 'F', mass: 'oz', volume: 'gal', pressure: 'psi' };
  const setUnits = (who: SignedInMember, body: object) =>
    request(testApp.url).patch('/api/me/units').set('authorization', who.bearer).send(body);
  const me = (who: SignedInMember) => request(testApp.url).get('/api/me').set('authorization', who.bearer);

  it('is metric until somebody chooses, and then theirs alone', async () => {
    const taster = await signInAs(testApp, 'taster', { house: owner.house });
    expect((await me(taster)).body).toMatchObject({
      member: { units: { temperature: 'C', mass: 'g', volume: 'L', pressure: 'kPa' } },
    });
    for (let n = 0; n < 2; n += 1) {
      const answer = await setUnits(taster, units);
      expect(answer.status).toBe(200);
      expect(answer.body).toMatchObject({ id: taster.member.id, units });
    }
    expect((await me(taster)).body).toMatchObject({ member: { units } });
    expect((await me(owner)).body).toMatchObject({ member: { units: { temperature: 'C' } } });
  });

  it('needs a sign-in, and units that there are', async () => {
    expectProblem(await request(testApp.url).patch('/api/me/units').send(units), 'not-signed-in');
    expectProblem(await setUnits(owner, { ...units, temperature: 'K', mass: 1e9 }), 'not-valid', [
      '/temperature',
      '/mass',
    ]);
    expectProblem(await setUnits(owner, { temperature: 'F' }), 'not-valid');
  });
});
