import { may, roleSchema } from '@steepfall/shared/contracts';
import request from 'supertest';
import { v7 } from 'uuid';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildProbe, signInAs } from '../../../test/builders.js';
import { createTestApp, type TestApp } from '../../../test/create-test-app.js';
import { everyHandler, type Handler } from '../../../test/every-handler.js';
import { expectProblem } from '../../../test/problem-matcher.js';

let testApp: TestApp;
let handlers: Handler[];
beforeAll(async () => {
  testApp = await createTestApp();
  handlers = everyHandler(testApp.app);
});
afterAll(() => testApp.close());

/** Asks with ids that are nobody's and without a body: enough to meet the guard, too little to do anything. */
function ask({ route }: Handler, bearer?: string) {
  const { method, path } = route!;
  const asked = request(testApp.url)[method as 'get'](path.replaceAll(/:\w+/g, () => v7()));
  return bearer ? asked.set('authorization', bearer) : asked;
}

describe('every handler', () => {
  it('says who may call it', () => {
    expect(handlers.length).toBeGreaterThan(15);
    expect(handlers.filter(({ rule }) => !rule).map(({ name }) => name)).toEqual([]);
  });

  it('is open to everybody only where that is meant', () => {
    const open = handlers
      .filter(({ rule }) => rule?.kind === 'public')
      .map(({ route, message }) => route?.path ?? message);
    expect(open.sort()).toEqual(['/api/auth/refresh', '/api/auth/sign-in', '/api/auth/sign-out', '/api/health']);
  });

  it('that needs a member refuses strangers', async () => {
    for (const handler of handlers.filter(
      ({ rule, route }) => route && (rule?.kind === 'signed-in' || rule?.kind === 'permission'),
    ))
      expectProblem(await ask(handler), 'not-signed-in');
  });

  it('that is a door for probes refuses strangers, and members too', async () => {
    const { bearer } = await signInAs(testApp, 'owner');
    for (const handler of handlers.filter(({ rule, route }) => route && rule?.kind === 'device')) {
      expectProblem(await ask(handler), 'device-token-unknown');
      expectProblem(await ask(handler, bearer), 'device-token-unknown');
    }
  });

  it('that is a door for followers refuses strangers, members and probes', async () => {
    const { bearer, accessToken, house } = await signInAs(testApp, 'owner');
    const { bearer: probe } = await buildProbe(testApp, house);
    const doors = handlers.filter(({ rule, route }) => route && rule?.kind === 'follower');
    expect(doors.length).toBeGreaterThan(0);
    for (const handler of doors)
      for (const shown of [undefined, bearer, probe, `Follow ${accessToken}`, `Follow ${'A'.repeat(43)}`])
        expectProblem(await ask(handler, shown), 'follow-link-unknown');
  });
});

describe.each(roleSchema.options)('a %s', (role) => {
  it('gets through where the table says so, and nowhere else', async () => {
    const { bearer } = await signInAs(testApp, role);
    for (const handler of handlers) {
      if (handler.rule?.kind !== 'permission' || !handler.route) continue;
      const response = await ask(handler, bearer);
      if (!may(role, handler.rule.permission)) expectProblem(response, 'not-allowed');
      else expect([200, 400, 404, 422], `${handler.name} for a ${role}`).toContain(response.status);
    }
  });
});
