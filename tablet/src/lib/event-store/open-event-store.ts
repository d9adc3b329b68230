import type { EventStore } from './event-store.ts';
import { IdbEventStore } from './idb-event-store.ts';
import { MemoryEventStore } from './memory-event-store.ts';

const opened = new Map<string, Promise<EventStore>>();

/** The store of one house: what another house did on this tablet stays in a store of its own. */
export function openEventStore(houseId: string): Promise<EventStore> {
  let store = opened.get(houseId);
  if (!store) {
    store = IdbEventStore.open(`steepfall-runs-${houseId}`).catch(() => new MemoryEventStore());
    opened.set(houseId, store);
  }
  return store;
}
