import { MAX_READINGS_A_CALL } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import type { WallClock } from '../clock/index.js';
import { backoffMs } from './backoff.js';
import { BatchRefusedError, HubAwayError, type Door } from './door.js';

/** Where readings go: the hub, or standard output. */
export interface Sink {
  /** Never waits and never throws. */
  offer(readings: readonly Reading[]): void;
  /** Resolves when everything offered so far is delivered, or false at the time limit. */
  delivered(withinMs: number): Promise<boolean>;
  /** Set when no reading will ever be delivered again. */
  readonly failure: Error | null;
  close(): void;
}

export interface ForwarderCounts {
  accepted: number;
  duplicates: number;
  /** The hub said that it will never take them. */
  refused: number;
  /** Thrown away here because the store was full. */
  dropped: number;
}

export interface ForwarderOptions {
  door: Door;
  clock: WallClock;
  random: () => number;
  /** Told once when the hub goes away, when it is back, and for each refusal. */
  onNotice: (text: string) => void;
  /** Readings kept while the hub is away; the oldest go first. */
  capacity?: number;
  batchSize?: number;
}

/**
 * Store and forward: readings wait here until the hub has acknowledged them. A batch whose acknowledgement was lost is sent
 * again, so the hub gets everything at least once and must recognise what it has.
 */
export class Forwarder implements Sink {
  readonly counts: ForwarderCounts = { accepted: 0, duplicates: 0, refused: 0, dropped: 0 };
  failure: Error | null = null;
  #waiting: Reading[] = [];
  #inFlight: Reading[] = [];
  #batchSize: number;
  #isPumping = false;
  #isAway = false;
  readonly #capacity: number;
  readonly #closed = new AbortController();
  readonly #options: ForwarderOptions;
  #wakeIdle: (() => void)[] = [];

  constructor(options: ForwarderOptions) {
    this.#options = options;
    this.#capacity = options.capacity ?? 100_000;
    this.#batchSize = Math.min(options.batchSize ?? 500, MAX_READINGS_A_CALL);
  }

  get waitingCount(): number {
    return this.#waiting.length + this.#inFlight.length;
  }

  get isAway(): boolean {
    return this.#isAway;
  }

  offer(readings: readonly Reading[]): void {
    if (this.failure || this.#closed.signal.aborted) return;
    this.#waiting.push(...readings);
    const excess = this.waitingCount - this.#capacity;
    if (excess > 0) {
      if (this.counts.dropped === 0) this.#options.onNotice('The store is full: the oldest readings are thrown away.');
      this.counts.dropped += this.#waiting.splice(0, excess).length;
    }
    if (!this.#isPumping) void this.#pump();
  }

  async delivered(withinMs: number): Promise<boolean> {
    if (this.#isIdle()) return this.failure === null;
    const timeUp = new AbortController();
    await Promise.race([
      new Promise<void>((resolve) => this.#wakeIdle.push(resolve)),
      this.#options.clock.sleep(withinMs, timeUp.signal),
    ]);
    timeUp.abort();
    return this.waitingCount === 0 && this.failure === null;
  }

  close(): void {
    this.#closed.abort();
    this.#options.door.close();
  }

  async #pump(): Promise<void> {
    this.#isPumping = true;
    let attempt = 0;
    while (!this.#isIdle() && !this.#closed.signal.aborted) {
      if (this.#inFlight.length === 0) this.#inFlight = this.#waiting.splice(0, this.#batchSize);
      try {
        const { accepted, duplicates, refused } = await this.#options.door.push(this.#inFlight);
        this.counts.accepted += accepted;
        this.counts.duplicates += duplicates;
        this.counts.refused += refused.length;
        const first = refused[0];
        if (first)
          this.#options.onNotice(`The hub refused ${refused.length} of ${this.#inFlight.length}: ${first.reason}.`);
        this.#inFlight = [];
        attempt = 0;
        this.#setAway(null);
      } catch (error) {
        if (this.#closed.signal.aborted) break;
        if (error instanceof HubAwayError) {
          attempt += 1;
          this.#setAway(error);
          const waitMs = Math.max(error.retryAfterMs ?? 0, backoffMs(attempt, this.#options.random()));
          await this.#options.clock.sleep(waitMs, this.#closed.signal);
        } else if (error instanceof BatchRefusedError) this.#giveUpBatch(error);
        else this.#fail(error);
      }
    }
    this.#isPumping = false;
    for (const wake of this.#wakeIdle.splice(0)) wake();
  }

  #isIdle(): boolean {
    return this.failure !== null || this.waitingCount === 0;
  }

  #setAway(error: HubAwayError | null): void {
    if ((error !== null) === this.#isAway) return;
    this.#isAway = error !== null;
    this.#options.onNotice(error ? `${error.message} Readings wait here until it is back.` : 'The hub is back.');
  }

  #giveUpBatch(error: BatchRefusedError): void {
    if (error.isTooLarge && this.#inFlight.length > 1) {
      this.#batchSize = Math.ceil(this.#inFlight.length / 2);
      this.#waiting.unshift(...this.#inFlight.splice(0));
      return;
    }
    this.#options.onNotice(`The hub refused ${this.#inFlight.length} readings: ${error.message}`);
    this.counts.refused += this.#inFlight.length;
    this.#inFlight = [];
  }

  #fail(error: unknown): void {
    this.failure = error instanceof Error ? error : new Error(String(error));
    this.#waiting = [];
    this.#inFlight = [];
    this.#options.door.close();
  }
}
