import { io, type Socket } from 'socket.io-client';
import {
  PROTOCOL_VERSION,
  type ClientToHubEvents,
  type HubToClientEvents,
  type MemberHandshake,
} from '@steepfall/shared/contracts';
import { problemSchema, type Problem } from '@steepfall/shared/problems';
import { HubProblemError, HubUnreachableError } from '../http.ts';
import { getAccessToken, refreshSession, sessionState, subscribeSession } from '../session.ts';
import { ValueStore } from '../value-store.ts';
import type { AskAnswer, AskMessage, AskName, HubLink, LinkState } from './hub-link.ts';

/** After a refused handshake: not at once again, or a hub that keeps saying no is asked in a tight loop. */
const REFUSED_RETRY_MS = [500, 2_000, 5_000, 15_000, 30_000];
const ANSWER_MS = 5_000;

type HubSocket = Socket<HubToClientEvents, ClientToHubEvents>;

/** What the hub's handshake gate hangs on its refusal. */
function problemOfRefusal(error: Error): Problem | null {
  const data = 'data' in error ? error.data : undefined;
  const candidate = typeof data === 'object' && data !== null && 'problem' in data ? data.problem : data;
  const parsed = problemSchema.safeParse(candidate);
  return parsed.success ? parsed.data : null;
}

/** Keeps one socket for one signed-in member. Exported for its spec; the app uses `hubLink`. */
export class HubConnection implements HubLink {
  readonly state = new ValueStore<LinkState>({ status: 'off', sinceMs: Date.now(), problem: null });
  private refusedCount = 0;
  private retryTimer: ReturnType<typeof setTimeout> | undefined;
  private isOpened = false;
  private memberId: string | null = null;

  constructor(private readonly socket: HubSocket) {
    socket.on('connect', () => {
      this.refusedCount = 0;
      this.become('connected');
    });
    socket.on('disconnect', (reason) => {
      this.become(this.memberId === null ? 'off' : 'away');
      // The library comes back by itself from everything but this one.
      if (reason === 'io server disconnect') this.connectSoon();
    });
    socket.on('connect_error', (error) => {
      this.become('away', problemOfRefusal(error));
      if (!socket.active) this.connectSoon();
    });
  }

  /** Connects while somebody is signed in, from now on. Safe to call as often as one likes. */
  open(): void {
    if (this.isOpened) return;
    this.isOpened = true;
    subscribeSession(() => this.followSession());
    document.addEventListener('visibilitychange', () => this.wake());
    addEventListener('online', () => this.wake());
    addEventListener('pageshow', () => this.wake());
    this.followSession();
  }

  async ask<Name extends AskName>(
    name: Name,
    message: AskMessage<Name>,
    timeoutMs = ANSWER_MS,
  ): Promise<AskAnswer<Name>> {
    if (!this.socket.connected) throw new HubUnreachableError('not connected');
    let answer: unknown;
    try {
      // The library's own types lose the pairing of name and message; HubLink restores it.
      const ask = this.socket.timeout(timeoutMs).emitWithAck as (name: string, message: unknown) => Promise<unknown>;
      answer = await ask.call(this.socket.timeout(timeoutMs), name, message);
    } catch (error) {
      throw new HubUnreachableError(error);
    }
    const refused = answer as { problem?: unknown } | null | undefined;
    if (refused && typeof refused === 'object' && 'problem' in refused) {
      throw new HubProblemError(problemSchema.parse(refused.problem));
    }
    return answer as AskAnswer<Name>;
  }

  on<Name extends keyof HubToClientEvents>(name: Name, handler: HubToClientEvents[Name]): () => void {
    this.socket.on(name, handler as never);
    return () => this.socket.off(name, handler as never);
  }

  private become(status: LinkState['status'], problem: Problem | null = null): void {
    const { status: before, sinceMs } = this.state.get();
    this.state.set({ status, sinceMs: before === status ? sinceMs : Date.now(), problem });
  }

  /** One line for one person: another member on this tablet gets a line of their own. */
  private followSession(): void {
    const session = sessionState();
    const memberId = session.known?.member.id ?? null;
    if (memberId === this.memberId) return;
    this.memberId = memberId;
    clearTimeout(this.retryTimer);
    this.refusedCount = 0;
    this.socket.disconnect();
    if (memberId === null) return this.become('off');
    this.become('connecting');
    this.socket.connect();
  }

  private connectSoon(): void {
    if (this.memberId === null) return;
    clearTimeout(this.retryTimer);
    const waitMs = REFUSED_RETRY_MS[Math.min(this.refusedCount, REFUSED_RETRY_MS.length - 1)];
    this.refusedCount += 1;
    this.retryTimer = setTimeout(() => void this.renewAndConnect(), waitMs);
  }

  private async renewAndConnect(): Promise<void> {
    // What the hub refused may be an access token that ran out.
    await refreshSession();
    if (this.memberId !== null && !this.socket.connected) this.socket.connect();
  }

  private wake(): void {
    if (document.visibilityState !== 'visible' || this.memberId === null || this.socket.connected) return;
    clearTimeout(this.retryTimer);
    // A waiting reconnection is cut short: somebody looks at the screen now.
    this.socket.disconnect();
    this.become('connecting');
    this.socket.connect();
  }
}

function makeSocket(): HubSocket {
  return io({
    autoConnect: false,
    transports: ['websocket'],
    reconnectionDelay: 500,
    reconnectionDelayMax: 5_000,
    auth: (give) => {
      void Promise.resolve(getAccessToken() ?? refreshSession()).then((accessToken) => {
        give({ accessToken: accessToken ?? '', protocol: PROTOCOL_VERSION } satisfies MemberHandshake);
      });
    },
  });
}

let connection: HubConnection | null = null;

/** The one line to the hub of this tab; opened on first use. */
export function hubLink(): HubLink {
  connection ??= new HubConnection(makeSocket());
  connection.open();
  return connection;
}
