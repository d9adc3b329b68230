import { problem } from '@steepfall/shared/problems';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

const memberId = '0198f3a0-0000-7000-8000-000000000001';
const houseId = '0198f3a0-0000-7000-8000-000000000002';

function sessionOf(accessToken: string) {
  return {
    accessToken,
    expiresAtMs: 1_800_000_000_000,
    member: { id: memberId, displayName: 'Brewer', email: 'brewer@wrenfold.example', role: 'brewer', isActive: true },
    house: { id: houseId, name: 'Wrenfold Drinks', altitudeM: 120, version: 1 },
  };
}

const answer = (body: unknown, status = 200) => new Response(JSON.stringify(body), { status });
const expired = () => answer(problem('session-expired', 'Sign in again.'), 401);

/** A hub that takes one token only, and gives out a new one on each refresh. */
class FakeHub {
  goodToken = 'token-0';
  refreshCount = 0;
  calls: string[] = [];
  refresh: () => Response | Promise<Response> = () => {
    this.refreshCount += 1;
    this.goodToken = `token-${this.refreshCount}`;
    return answer(sessionOf(this.goodToken));
  };

  fetch = async (input: RequestInfo | URL, init?: RequestInit): Promise<Response> => {
    const path = String(input);
    this.calls.push(path);
    await Promise.resolve();
    if (path === '/api/auth/refresh') return this.refresh();
    if (path === '/api/auth/sign-in') return answer(sessionOf(this.goodToken));
    const token = new Headers(init?.headers).get('Authorization');
    return token === `Bearer ${this.goodToken}` ? answer({ path }) : expired();
  };
}

async function start() {
  vi.resetModules();
  const hub = new FakeHub();
  vi.stubGlobal('fetch', hub.fetch);
  const session = await import('./session.ts');
  const { callHub } = await import('./api-client.ts');
  const { HubProblemError, HubUnreachableError } = await import('./http.ts');
  return { hub, session, callHub, HubProblemError, HubUnreachableError };
}

describe('callHub', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
    vi.unstubAllGlobals();
  });

  it('sends the token of the session', async () => {
    const { hub, session, callHub } = await start();
    await session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    await expect(callHub('house')).resolves.toEqual({ path: '/api/house' });
    expect(hub.refreshCount).toBe(0);
  });

  it('renews a token that ran out once, for all who meet it', async () => {
    const { hub, session, callHub } = await start();
    await session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    hub.goodToken = 'somebody-moved-it';
    const answers = await Promise.all([callHub('house'), callHub('batches'), callHub('runs')]);
    expect(answers).toHaveLength(3);
    expect(hub.refreshCount).toBe(1);
    expect(session.getAccessToken()).toBe('token-1');
  });

  it('asks again only once: a token that is refused twice is a problem', async () => {
    const { hub, session, callHub, HubProblemError } = await start();
    await session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    hub.goodToken = 'none';
    hub.refresh = () => {
      hub.refreshCount += 1;
      return answer(sessionOf('still-not-good'));
    };
    await expect(callHub('house')).rejects.toBeInstanceOf(HubProblemError);
    expect(hub.refreshCount).toBe(1);
  });

  it('signs out when the hub says that the session has ended', async () => {
    const { hub, session, callHub } = await start();
    await session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    hub.goodToken = 'none';
    hub.refresh = expired;
    await expect(callHub('house')).rejects.toMatchObject({ type: 'session-expired' });
    expect(session.sessionState()).toEqual({ status: 'signed-out', known: null, reason: 'expired' });
    expect(localStorage.getItem('steepfall.known')).toBeNull();
  });

  it('tells silence from refusal', async () => {
    const { callHub, HubUnreachableError } = await start();
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')));
    await expect(callHub('house')).rejects.toBeInstanceOf(HubUnreachableError);
  });

  it('reads a refusal that is no problem document', async () => {
    const { callHub } = await start();
    vi.stubGlobal('fetch', async (input: RequestInfo | URL) =>
      String(input).endsWith('refresh')
        ? answer(sessionOf('token'))
        : new Response('<html>Bad gateway</html>', { status: 502 }),
    );
    await expect(callHub('house')).rejects.toMatchObject({ type: 'unavailable' });
  });
});

describe('the session', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
    vi.unstubAllGlobals();
  });

  it('knows who was signed in when the hub is away, and asks until it is back', async () => {
    const first = await start();
    await first.session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    expect(localStorage.getItem('steepfall.known')).not.toContain('token');

    const { hub, session } = await start();
    hub.refresh = () => Promise.reject(new TypeError('Failed to fetch'));
    session.startSession();
    expect(session.sessionState().known?.house.name).toBe('Wrenfold Drinks');
    await vi.advanceTimersByTimeAsync(100);
    expect(session.sessionState()).toMatchObject({ status: 'unconfirmed', known: { member: { id: memberId } } });

    hub.refresh = () => answer(sessionOf('back'));
    await vi.advanceTimersByTimeAsync(31_000);
    expect(session.sessionState().status).toBe('signed-in');
    expect(session.getAccessToken()).toBe('back');
  });

  it('stays signed out when an answer to an older question comes late', async () => {
    const { hub, session } = await start();
    await session.signIn({ email: 'brewer@wrenfold.example', password: 'long enough' });
    let tell: (response: Response) => void = () => undefined;
    hub.refresh = () =>
      new Promise((resolve) => {
        tell = resolve;
      });
    const asked = session.refreshSession();
    await vi.advanceTimersByTimeAsync(1);
    await session.signOut();
    tell(answer(sessionOf('late')));
    await asked;
    expect(session.sessionState()).toEqual({ status: 'signed-out', known: null, reason: 'asked' });
    expect(session.getAccessToken()).toBeNull();
  });
});
