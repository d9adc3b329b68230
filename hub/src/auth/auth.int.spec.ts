import request from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { buildMember, modelOf, signInAs, type BuiltMember } from '../../test/builders.js';
import { createTestApp, type TestApp } from '../../test/create-test-app.js';
import { expectProblem } from '../../test/problem-matcher.js';
import { Clock } from '../common/clock.js';
import { Membership } from '../members/models/membership.model.js';
import { SessionToken } from '../sessions/models/session-token.model.js';
import { Session } from '../sessions/models/session.model.js';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());
afterEach(() => {
  vi.restoreAllMocks();
});

const cookieOf = (response: request.Response) => String(response.headers['set-cookie']).split(';')[0]!;

async function signIn({ email, password }: BuiltMember) {
  const response = await request(testApp.url).post('/api/auth/sign-in').send({ email, password });
  expect(response.status).toBe(200);
  return { accessToken: (response.body as { accessToken: string }).accessToken, cookie: cookieOf(response), response };
}
const refresh = (cookie: string) => request(testApp.url).post('/api/auth/refresh').set('cookie', cookie);
const me = (accessToken: string) => request(testApp.url).get('/api/me').set('authorization', `Bearer ${accessToken}`);

/** From now on the hub's clock is this much later. */
function passTime(durationMs: number): void {
  vi.spyOn(testApp.app.get(Clock), 'nowMs').mockImplementation(() => Date.now() + durationMs);
}

describe('POST /api/auth/sign-in', () => {
  it('refuses a body that does not fit, and names every field', async () => {
    const response = await request(testApp.url).post('/api/auth/sign-in').send({ email: 'nobody', extra: 1 });
    expectProblem(response, 'not-valid', ['/email', '/password', '']);
    expect(response.body).toMatchObject({ instance: '/api/auth/sign-in' });
    expect(response.body).toHaveProperty('traceId', expect.stringMatching(/^[0-9a-f-]{36}$/));
  });

  it('refuses what is not JSON, and a body that is not there', async () => {
    const post = () => request(testApp.url).post('/api/auth/sign-in');
    expectProblem(await post().type('json').send('{"email'), 'not-readable');
    expectProblem(await post(), 'not-readable');
    expectProblem(await post().type('form').send('email=a@house.example'), 'not-readable');
    expectProblem(
      await post()
        .type('json')
        .send(`"${'a'.repeat(300_000)}"`),
      'too-large',
    );
  });

  it('says the same of a wrong password, of an unknown address and of a member who was taken out', async () => {
    const known = await buildMember(testApp);
    const gone = await buildMember(testApp, { isActive: false });
    const tries = [
      { email: known.email, password: 'something else' },
      { email: 'nobody@house.example', password: known.password },
      { email: gone.email, password: gone.password },
    ];
    const answers = [];
    for (const body of tries) {
      const response = await request(testApp.url).post('/api/auth/sign-in').send(body);
      expectProblem(response, 'wrong-credentials');
      expect(response.headers['set-cookie']).toBeUndefined();
      answers.push((response.body as { detail: string }).detail);
    }
    expect(new Set(answers).size).toBe(1);
  });

  it('signs in, whatever the case of the address, with a cookie no script can read', async () => {
    const member = await buildMember(testApp, { role: 'hand' });
    const { response, accessToken } = await signIn({ ...member, email: member.email.toUpperCase() });
    expect(response.body).toMatchObject({
      member: { id: member.member.id, role: 'hand', email: member.email },
      house: { id: member.house.id },
    });
    const cookie = String(response.headers['set-cookie']);
    for (const part of ['HttpOnly', 'SameSite=Strict', 'Path=/api/auth']) expect(cookie).toContain(part);
    expect(cookie).not.toContain('Secure');
    expect(JSON.stringify(response.body)).not.toContain(cookieOf(response).split('=')[1]);
    const { member: answered, house } = response.body as { member: unknown; house: unknown };
    expect((await me(accessToken)).body).toEqual({ member: answered, house });
  });

  it('signs in twice: two sessions that know nothing of each other', async () => {
    const member = await buildMember(testApp);
    const [first, second] = [await signIn(member), await signIn(member)];
    await request(testApp.url).post('/api/auth/sign-out').set('cookie', first.cookie).expect(204);
    expect((await refresh(second.cookie)).status).toBe(200);
    expectProblem(await refresh(first.cookie), 'session-expired');
  });

  it('takes the house in which a person has been longest', async () => {
    const first = await buildMember(testApp, { role: 'hand' });
    const second = await buildMember(testApp, { role: 'owner', email: first.email });
    expect((await signIn(second)).response.body).toMatchObject({ house: { id: first.house.id } });
    await modelOf(testApp, Membership).update({ isActive: false }, { where: { id: first.member.id } });
    expect((await signIn(second)).response.body).toMatchObject({ house: { id: second.house.id } });
  });

  it('slows down whoever guesses, without locking out others', async () => {
    const victim = await buildMember(testApp);
    const guess = () =>
      request(testApp.url).post('/api/auth/sign-in').send({ email: victim.email, password: 'a guess at it' });
    for (let n = 0; n < 20; n += 1) expectProblem(await guess(), 'wrong-credentials');
    expectProblem(await guess(), 'too-many-tries');
    const right = await request(testApp.url)
      .post('/api/auth/sign-in')
      .send({ email: victim.email, password: victim.password });
    expectProblem(right, 'too-many-tries');
    await signIn(await buildMember(testApp));
  });
});

describe('GET /api/me', () => {
  it('needs a sign-in', async () => {
    expectProblem(await request(testApp.url).get('/api/me'), 'not-signed-in');
    expectProblem(await me('not.a.token'), 'not-signed-in');
  });

  it('refuses a token signed with another secret, with none, or that has run out', async () => {
    const { accessToken } = await signInAs(testApp, 'owner');
    const [header, claims, signature] = accessToken.split('.') as [string, string, string];
    const encode = (value: object) => Buffer.from(JSON.stringify(value)).toString('base64url');
    const forged = { ...JSON.parse(Buffer.from(claims, 'base64url').toString()), role: 'owner' } as object;
    expectProblem(await me(`${encode({ alg: 'none', typ: 'JWT' })}.${claims}.`), 'not-signed-in');
    expectProblem(await me(`${header}.${encode({ ...forged, hid: 'x' })}.${signature}`), 'not-signed-in');
    passTime(-11 * 60_000);
    const old = await signInAs(testApp, 'owner');
    expectProblem(await me(old.accessToken), 'session-expired');
  });
});

describe('POST /api/auth/refresh', () => {
  it('needs a cookie, and one that is known', async () => {
    expectProblem(await request(testApp.url).post('/api/auth/refresh'), 'not-signed-in');
    const unknown = await refresh('steepfall_refresh=made-up');
    expectProblem(unknown, 'session-expired');
    expect(String(unknown.headers['set-cookie'])).toContain('steepfall_refresh=;');
  });

  it('gives a new pair each time, and keeps only hashes', async () => {
    const { cookie } = await signIn(await buildMember(testApp));
    const second = await refresh(cookie);
    const third = await refresh(cookieOf(second));
    expect(third.status).toBe(200);
    expect(new Set([cookie, cookieOf(second), cookieOf(third)]).size).toBe(3);
    const hashes = (await modelOf(testApp, SessionToken).findAll()).map((row) => row.tokenHash);
    expect(hashes).not.toContain(cookie.split('=')[1]);
    expect(hashes.every((hash) => /^[0-9a-f]{64}$/.test(hash))).toBe(true);
  });

  it('serves two tabs that wake up with the same token', async () => {
    const { cookie } = await signIn(await buildMember(testApp));
    const both = await Promise.all([refresh(cookie), refresh(cookie)]);
    expect(both.map(({ status }) => status)).toEqual([200, 200]);
    for (const tab of both) expect((await refresh(cookieOf(tab))).status).toBe(200);
  });

  it('ends the whole session when a token comes back after its successor was used', async () => {
    const member = await buildMember(testApp);
    const { cookie } = await signIn(member);
    const second = await refresh(cookie);
    const third = await refresh(cookieOf(second));
    passTime(11_000);
    expectProblem(await refresh(cookie), 'session-expired');
    expectProblem(await refresh(cookieOf(third)), 'session-expired');
    expectProblem(await me((third.body as { accessToken: string }).accessToken), 'session-expired');
    const session = await modelOf(testApp, Session).findOne({ where: { memberId: member.member.id } });
    expect(session?.revokedBecause).toBe('token-reused');
  });

  it('forgives an answer that was lost on the way, and then trusts only the new token', async () => {
    const { cookie } = await signIn(await buildMember(testApp));
    const lost = await refresh(cookie);
    passTime(3_600_000);
    const again = await refresh(cookie);
    expect(again.status).toBe(200);
    expectProblem(await refresh(cookieOf(lost)), 'session-expired');
    expectProblem(await refresh(cookieOf(again)), 'session-expired');
  });

  it('ends after thirty days without use', async () => {
    const { cookie } = await signIn(await buildMember(testApp));
    passTime(30 * 24 * 3600 * 1000 + 1000);
    expectProblem(await refresh(cookie), 'session-expired');
  });

  it('brings the role of today', async () => {
    const { member, ...built } = await buildMember(testApp, { role: 'hand' });
    const { cookie } = await signIn({ member, ...built });
    await member.update({ role: 'brewer' });
    expect((await refresh(cookie)).body).toMatchObject({ member: { role: 'brewer' } });
  });
});

describe('POST /api/auth/sign-out', () => {
  it('ends the session and its access token; a second time is no error', async () => {
    const { cookie, accessToken } = await signIn(await buildMember(testApp));
    const out = await request(testApp.url).post('/api/auth/sign-out').set('cookie', cookie).expect(204);
    expect(String(out.headers['set-cookie'])).toContain('steepfall_refresh=;');
    expectProblem(await me(accessToken), 'session-expired');
    await request(testApp.url).post('/api/auth/sign-out').set('cookie', cookie).expect(204);
    await request(testApp.url).post('/api/auth/sign-out').expect(204);
  });
});
