import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { problem } from '@steepfall/shared/problems';

const session = vi.hoisted(() => ({
  known: null as { member: { id: string } } | null,
  listeners: new Set<() => void>(),
  refreshes: 0,
}));
vi.mock('../session.ts', () => ({
  getAccessToken: () => 'token',
  refreshSession: async () => {
    session.refreshes += 1;
    return 'fresh token';
  },
  sessionState: () => ({ known: session.known }),
  subscribeSession: (listener: () => void) => {
    session.listeners.add(listener);
    return () => session.listeners.delete(listener);
  },
}));

const { HubConnection } = await import('./hub-socket.ts');

/** What the library's socket does, as far as it matters here. */
class FakeSocket {
  connected = false;
  active = false;
  connects = 0;
  answer: unknown = {};
  private readonly handlers = new Map<string, Set<(value: never) => void>>();
  on(name: string, handler: (value: never) => void) {
    this.handlers.set(name, (this.handlers.get(name) ?? new Set()).add(handler));
  }
  off(name: string, handler: (value: never) => void) {
    this.handlers.get(name)?.delete(handler);
  }
  fire(name: string, value?: unknown) {
    for (const handler of this.handlers.get(name) ?? []) handler(value as never);
  }
  count(name: string) {
    return this.handlers.get(name)?.size ?? 0;
  }
  connect() {
    this.connects += 1;
    this.active = true;
  }
  disconnect() {
    this.active = false;
    this.connected = false;
  }
  accept() {
    this.connected = true;
    this.fire('connect');
  }
  refuse(detail: string) {
    this.active = false;
    this.fire(
      'connect_error',
      Object.assign(new Error('refused'), { data: { problem: problem('session-expired', detail) } }),
    );
  }
  timeout() {
    return {
      emitWithAck: async () => {
        if (this.answer instanceof Error) throw this.answer;
        return this.answer;
      },
    };
  }
}

function open() {
  const socket = new FakeSocket();
  const connection = new HubConnection(socket as never);
  connection.open();
  return { socket, connection };
}

function become(memberId: string | null) {
  session.known = memberId ? { member: { id: memberId } } : null;
  for (const listener of session.listeners) listener();
}

beforeEach(() => {
  vi.useFakeTimers();
  session.listeners.clear();
  session.refreshes = 0;
  session.known = { member: { id: 'one' } };
});
afterEach(() => {
  vi.useRealTimers();
});

describe(HubConnection, () => {
  it('connects once, however often it is opened', () => {
    const { socket, connection } = open();
    connection.open();
    connection.open();
    expect(socket.connects).toBe(1);
    socket.accept();
    expect(connection.state.get().status).toBe('connected');
  });

  it('renews the sign-in and comes back after a refusal, which the library does not', async () => {
    const { socket, connection } = open();
    socket.refuse('The session has ended.');
    expect(connection.state.get()).toMatchObject({ status: 'away', problem: { detail: 'The session has ended.' } });
    await vi.advanceTimersByTimeAsync(500);
    expect([session.refreshes, socket.connects]).toEqual([1, 2]);
  });

  it('does not ask a hub in a tight loop that keeps refusing', async () => {
    const { socket } = open();
    for (let i = 0; i < 4; i += 1) {
      socket.refuse('No.');
      await vi.advanceTimersByTimeAsync(500);
    }
    expect(socket.connects).toBeLessThanOrEqual(2);
  });

  it('comes back when the hub itself has ended the line', async () => {
    const { socket, connection } = open();
    socket.accept();
    socket.disconnect();
    socket.fire('disconnect', 'io server disconnect');
    expect(connection.state.get().status).toBe('away');
    await vi.advanceTimersByTimeAsync(500);
    expect(socket.connects).toBe(2);
  });

  it('gives another member a line of their own, and nobody none', () => {
    const { socket, connection } = open();
    socket.accept();
    become('two');
    expect(socket.connects).toBe(2);
    become('two');
    expect(socket.connects).toBe(2);
    become(null);
    expect(connection.state.get().status).toBe('off');
    expect(socket.active).toBe(false);
  });

  it('takes off only the handler that was put on', () => {
    const { socket, connection } = open();
    const before = socket.count('runs.changed');
    const stops = [connection.on('runs.changed', vi.fn()), connection.on('runs.changed', vi.fn())];
    stops[0]!();
    expect(socket.count('runs.changed')).toBe(before + 1);
  });

  it('turns a refusal into a problem and a silence into unreachable', async () => {
    const { socket, connection } = open();
    const ask = () => connection.ask('run.join', { runId: 'x', afterSeq: 0 });
    await expect(ask()).rejects.toMatchObject({ name: 'HubUnreachableError' });
    socket.accept();
    socket.answer = { problem: problem('run-not-found', 'There is no such run.') };
    await expect(ask()).rejects.toMatchObject({ type: 'run-not-found' });
    socket.answer = new Error('timeout');
    await expect(ask()).rejects.toMatchObject({ name: 'HubUnreachableError' });
    socket.answer = { events: [] };
    await expect(ask()).resolves.toEqual({ events: [] });
  });
});
