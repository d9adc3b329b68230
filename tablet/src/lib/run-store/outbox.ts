import { version } from 'uuid';
import type { AppendedEvents } from '@steepfall/shared/contracts';
import { problemTypeOf, type Problem } from '@steepfall/shared/problems';
import type { RunEvent, StoredRunEvent } from '@steepfall/shared/runs';
import { HubProblemError } from '../http.ts';
import type { EventStore, OutboxItem } from '../event-store/event-store.ts';
import type { HubLink } from '../socket/hub-link.ts';
import { ValueStore, isShallowSame } from '../value-store.ts';

const BATCH = 100;
const BACK_OFF_MS = [1_000, 2_000, 5_000, 10_000, 30_000];
const LOOK_EVERY_MS = 30_000;
/** Refusals of the whole call that say nothing of the events: who asks, from which house, and how often. */
const NOT_ABOUT_EVENTS = [401, 403, 404, 429];

export type Sent =
  | { kind: 'confirmed'; events: StoredRunEvent[] }
  /** The hub has another fact under this id (two devices found out the same): it will tell us. */
  | { kind: 'dropped'; eventId: string }
  | { kind: 'parked'; eventId: string; problem: Problem };

interface RunQueue {
  isSending: boolean;
  isOneByOne: boolean;
  failCount: number;
  timer: ReturnType<typeof setTimeout> | undefined;
}

/** Sends what this station did, in order, one call in flight for each run, until the hub has acknowledged it. */
export class Outbox {
  readonly counts = new ValueStore({ waiting: 0, parked: 0 }, isShallowSame);
  private readonly queues = new Map<string, RunQueue>();
  private readonly listeners = new Set<(runId: string, sent: Sent) => void>();
  /** What the store could not take: sent from memory, and lost with the page. */
  private unkept: OutboxItem[] = [];
  /** What was settled although the store could not be told: it must not be sent over and over. */
  private readonly settled = new Set<string>();
  private readonly parkedHere = new Map<string, OutboxItem>();

  constructor(
    private readonly link: HubLink,
    private readonly store: EventStore,
    /** False while somebody of another house is signed in: what waits here is not theirs to send. */
    private readonly isOwnHouse: () => boolean = () => true,
  ) {
    link.state.subscribe(() => {
      if (link.state.get().status !== 'connected') return;
      for (const queue of this.queues.values()) queue.failCount = 0;
      void this.sendAll();
    });
    document.addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'visible') void this.sendAll();
    });
    setInterval(() => void this.sendAll(), LOOK_EVERY_MS);
    void this.sendAll();
  }

  onSent(listener: (runId: string, sent: Sent) => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  /** Carries events that could not be written to the store. */
  carry(events: readonly RunEvent[]): void {
    const nextOrder = (this.unkept.at(-1)?.order ?? Number.MAX_SAFE_INTEGER / 2) + 1;
    this.unkept.push(
      ...events.map((event, i) => ({
        order: nextOrder + i,
        runId: event.runId,
        eventId: event.id,
        event,
        status: 'pending' as const,
        problem: null,
        queuedAtMs: Date.now(),
      })),
    );
  }

  async sendAll(): Promise<void> {
    const items = await this.count();
    await Promise.all([...new Set(items.map(({ runId }) => runId))].map((runId) => this.send(runId)));
  }

  /** Sends what waits for one run; returns at once while a call for it is in flight, which then goes on with the rest. */
  async send(runId: string): Promise<void> {
    const queue = this.queueOf(runId);
    await this.count();
    if (queue.isSending || !this.canSend()) return;
    queue.isSending = true;
    clearTimeout(queue.timer);
    try {
      while (await this.sendNext(runId, queue));
    } catch {
      const waitMs = BACK_OFF_MS[Math.min(queue.failCount, BACK_OFF_MS.length - 1)];
      queue.failCount += 1;
      queue.timer = setTimeout(() => void this.send(runId), waitMs);
    } finally {
      queue.isSending = false;
      await this.count();
    }
  }

  /** A parked event once more, after a person asked for it. */
  async retry(eventId: string): Promise<void> {
    await this.store.mark([eventId], 'pending').catch(() => undefined);
    this.parkedHere.delete(eventId);
    this.unkept = this.unkept.map((item) =>
      item.eventId === eventId ? { ...item, status: 'pending', problem: null } : item,
    );
    await this.sendAll();
  }

  /** A person gives up on a parked event. */
  async giveUp(runId: string, eventId: string): Promise<void> {
    await this.drop(runId, eventId);
    await this.count();
  }

  /** What is parked in memory only, because the store could not take it. */
  parkedInMemory(runId: string): OutboxItem[] {
    const unkept = this.unkept.filter(({ status }) => status === 'parked');
    return [...unkept, ...this.parkedHere.values()].filter((item) => item.runId === runId);
  }

  private canSend(): boolean {
    return this.link.state.get().status === 'connected' && this.isOwnHouse();
  }

  private queueOf(runId: string): RunQueue {
    let queue = this.queues.get(runId);
    if (!queue) {
      queue = { isSending: false, isOneByOne: false, failCount: 0, timer: undefined };
      this.queues.set(runId, queue);
    }
    return queue;
  }

  private async items(): Promise<OutboxItem[]> {
    const kept = (await this.store.outbox().catch(() => []))
      .filter(({ eventId }) => !this.settled.has(eventId))
      .map((item) => this.parkedHere.get(item.eventId) ?? item);
    return [...kept, ...this.unkept];
  }

  private async count(): Promise<OutboxItem[]> {
    const items = await this.items();
    const parked = items.filter(({ status }) => status === 'parked').length;
    this.counts.set({ waiting: items.length - parked, parked });
    return items;
  }

  /** True when something was settled and more may wait. */
  private async sendNext(runId: string, queue: RunQueue): Promise<boolean> {
    if (!this.canSend()) return false;
    const waiting = (await this.items()).filter((item) => item.runId === runId && item.status !== 'parked');
    const batch = waiting.slice(0, queue.isOneByOne ? 1 : BATCH);
    if (batch.length === 0) {
      queue.isOneByOne = false;
      return false;
    }
    const ids = batch.map(({ eventId }) => eventId);
    await this.store.mark(ids, 'sent').catch(() => undefined);
    try {
      const answer = await this.link.ask('run.append', { runId, events: batch.map(({ event }) => event) });
      queue.failCount = 0;
      const settled = await this.settle(runId, batch, answer);
      if (settled === 0) throw new Error('The hub took none of it and refused none of it.');
      return true;
    } catch (error) {
      const problem = error instanceof HubProblemError ? error.problem : null;
      const isForGood =
        problem !== null && problem.status >= 400 && problem.status < 500 && !NOT_ABOUT_EVENTS.includes(problem.status);
      if (!isForGood) {
        await this.store.mark(ids, 'pending').catch(() => undefined);
        throw error;
      }
      // One bad event spoils a batch: find it alone, so that the others get through.
      if (batch.length > 1) queue.isOneByOne = true;
      else await this.park(batch[0]!, problem);
      return true;
    }
  }

  private async settle(
    runId: string,
    batch: readonly OutboxItem[],
    { stored, refused }: AppendedEvents,
  ): Promise<number> {
    const places = new Map(stored.map((place) => [place.id, place]));
    const events = batch.flatMap(({ event }) => {
      const place = places.get(event.id);
      if (!place) return [];
      const { seq, receivedAtMs, sentBy } = place;
      return [{ ...event, seq, receivedAtMs, sentBy }];
    });
    if (events.length > 0) {
      await this.store.confirm(events).catch(() => events.forEach(({ id }) => this.settled.add(id)));
      this.forget(events.map(({ id }) => id));
      this.tell(runId, { kind: 'confirmed', events });
    }
    for (const { id, problem } of refused) {
      const isFoundTwice = problemTypeOf(problem) === 'event-id-taken' && version(id) === 5;
      if (isFoundTwice) await this.drop(runId, id);
      else {
        const item = batch.find(({ eventId }) => eventId === id);
        if (item) await this.park(item, problem);
      }
    }
    return events.length + refused.length;
  }

  private async park(item: OutboxItem, problem: Problem): Promise<void> {
    const { runId, eventId } = item;
    const parked: OutboxItem = { ...item, status: 'parked', problem };
    if (this.unkept.some((one) => one.eventId === eventId))
      this.unkept = this.unkept.map((one) => (one.eventId === eventId ? parked : one));
    else await this.store.park(eventId, problem).catch(() => this.parkedHere.set(eventId, parked));
    this.tell(runId, { kind: 'parked', eventId, problem });
  }

  private async drop(runId: string, eventId: string): Promise<void> {
    await this.store.discard(eventId).catch(() => this.settled.add(eventId));
    this.parkedHere.delete(eventId);
    this.forget([eventId]);
    this.tell(runId, { kind: 'dropped', eventId });
  }

  private forget(eventIds: readonly string[]): void {
    this.unkept = this.unkept.filter(({ eventId }) => !eventIds.includes(eventId));
  }

  private tell(runId: string, sent: Sent): void {
    for (const listener of [...this.listeners]) listener(runId, sent);
  }
}
