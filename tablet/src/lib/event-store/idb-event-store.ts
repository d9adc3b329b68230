import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { Problem } from '@steepfall/shared/problems';
import type { LogEntry, RunEvent, StoredRunEvent } from '@steepfall/shared/runs';
import type { EventStore, KeptRun, LoadedRun, OutboxItem } from './event-store.ts';

interface Schema extends DBSchema {
  events: { key: string; value: LogEntry; indexes: { byRun: string } };
  outbox: {
    key: number;
    value: Omit<OutboxItem, 'order'> & { order?: number };
    indexes: { byRun: string; byEvent: string };
  };
  runs: { key: string; value: KeptRun; indexes: { byKeptAt: number } };
}

type Database = IDBPDatabase<Schema>;

/** Runs beyond the newest so many leave this station; the hub has them. One with something to send stays. */
const KEPT_RUNS = 40;

async function open(name: string): Promise<Database> {
  return openDB<Schema>(name, 1, {
    upgrade(database) {
      database.createObjectStore('events', { keyPath: 'id' }).createIndex('byRun', 'runId');
      const outbox = database.createObjectStore('outbox', { keyPath: 'order', autoIncrement: true });
      outbox.createIndex('byRun', 'runId');
      outbox.createIndex('byEvent', 'eventId', { unique: true });
      database.createObjectStore('runs', { keyPath: 'runId' }).createIndex('byKeptAt', 'keptAtMs');
    },
    // A newer build in another tab may change the shape: this connection must not be in its way.
    blocking: (_current, _blocked, event) => (event.target as IDBDatabase).close(),
  });
}

export class IdbEventStore implements EventStore {
  readonly isDurable = true;
  private constructor(
    private readonly name: string,
    private database: Database,
    private readonly wallMs: () => number,
  ) {}

  /** @throws when this browser has no IndexedDB, or lets nobody use it. */
  static async open(name: string, wallMs: () => number = Date.now): Promise<IdbEventStore> {
    const store = new IdbEventStore(name, await open(name), wallMs);
    await store.prune();
    return store;
  }

  /** For the specs: the connection goes, as browsers let it go in the background. */
  dropConnection(): void {
    this.database.close();
  }

  load(runId: string): Promise<LoadedRun> {
    return this.tryTwice(async (database) => {
      const transaction = database.transaction(['events', 'outbox', 'runs']);
      const [entries, outbox, run] = await Promise.all([
        transaction.objectStore('events').index('byRun').getAll(runId),
        transaction.objectStore('outbox').index('byRun').getAll(runId),
        transaction.objectStore('runs').get(runId),
      ]);
      return { entries, outbox: inOrder(outbox), run: run ?? null };
    });
  }

  append(events: readonly RunEvent[]): Promise<void> {
    const queuedAtMs = this.wallMs();
    return this.tryTwice(async (database) => {
      const transaction = database.transaction(['events', 'outbox'], 'readwrite');
      const outbox = transaction.objectStore('outbox');
      const log = transaction.objectStore('events');
      for (const event of events) {
        if ((await log.getKey(event.id)) !== undefined) continue;
        void log.put(event);
        void outbox.add({
          runId: event.runId,
          eventId: event.id,
          event,
          status: 'pending',
          problem: null,
          queuedAtMs,
        });
      }
      await transaction.done;
    });
  }

  confirm(events: readonly StoredRunEvent[]): Promise<void> {
    return this.tryTwice(async (database) => {
      const transaction = database.transaction(['events', 'outbox'], 'readwrite');
      const outbox = transaction.objectStore('outbox');
      for (const event of events) {
        void transaction.objectStore('events').put(event);
        const order = await outbox.index('byEvent').getKey(event.id);
        if (order !== undefined) void outbox.delete(order);
      }
      await transaction.done;
    });
  }

  mark(eventIds: readonly string[], status: 'pending' | 'sent'): Promise<void> {
    return this.change(eventIds, (item) => ({ ...item, status, problem: null }));
  }

  park(eventId: string, problem: Problem): Promise<void> {
    return this.change([eventId], (item) => ({ ...item, status: 'parked', problem }));
  }

  discard(eventId: string): Promise<void> {
    return this.tryTwice(async (database) => {
      const transaction = database.transaction(['events', 'outbox'], 'readwrite');
      const outbox = transaction.objectStore('outbox');
      const order = await outbox.index('byEvent').getKey(eventId);
      if (order !== undefined) void outbox.delete(order);
      const entry = await transaction.objectStore('events').get(eventId);
      if (entry && entry.seq === undefined) void transaction.objectStore('events').delete(eventId);
      await transaction.done;
    });
  }

  outbox(): Promise<OutboxItem[]> {
    return this.tryTwice(async (database) => inOrder(await database.getAll('outbox')));
  }

  keepRun(run: KeptRun): Promise<void> {
    return this.tryTwice(async (database) => {
      await database.put('runs', run);
    });
  }

  private change(
    eventIds: readonly string[],
    to: (item: Omit<OutboxItem, 'order'>) => Omit<OutboxItem, 'order'>,
  ): Promise<void> {
    return this.tryTwice(async (database) => {
      const transaction = database.transaction('outbox', 'readwrite');
      for (const eventId of eventIds) {
        const item = await transaction.store.index('byEvent').get(eventId);
        if (item) void transaction.store.put(to(item));
      }
      await transaction.done;
    });
  }

  /** Browsers drop idle connections without a word; the second try is on a fresh one. */
  private async tryTwice<Result>(work: (database: Database) => Promise<Result>): Promise<Result> {
    try {
      return await work(this.database);
    } catch {
      this.database = await open(this.name);
      return work(this.database);
    }
  }

  private prune(): Promise<void> {
    return this.tryTwice(async (database) => {
      const transaction = database.transaction(['events', 'outbox', 'runs'], 'readwrite');
      const oldestFirst = await transaction.objectStore('runs').index('byKeptAt').getAllKeys();
      for (const runId of oldestFirst.slice(0, Math.max(0, oldestFirst.length - KEPT_RUNS))) {
        if ((await transaction.objectStore('outbox').index('byRun').count(runId)) > 0) continue;
        for (const key of await transaction.objectStore('events').index('byRun').getAllKeys(runId)) {
          void transaction.objectStore('events').delete(key);
        }
        void transaction.objectStore('runs').delete(runId);
      }
      await transaction.done;
    });
  }
}

function inOrder(items: (Omit<OutboxItem, 'order'> & { order?: number })[]): OutboxItem[] {
  return items.map((item) => ({ ...item, order: item.order ?? 0 })).sort((a, b) => a.order - b.order);
}
