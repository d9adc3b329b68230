import { followBattery } from '../battery/battery.ts';
import { hubClock } from '../clock/hub-clock.ts';
import { subscribeTick, tickNow } from '../clock/ticker.ts';
import { openEventStore } from '../event-store/open-event-store.ts';
import { newId, stationName } from '../ids.ts';
import { sessionState } from '../session.ts';
import { hubLink } from '../socket/hub-socket.ts';
import { Outbox } from './outbox.ts';
import { RunStore } from './run-store.ts';

/** A page that leaves and comes straight back (a reload of a component, a look at the record) finds the run still open. */
const LINGER_MS = 10_000;

interface OpenRun {
  store: Promise<RunStore>;
  users: number;
  closeTimer: ReturnType<typeof setTimeout> | undefined;
}

const runs = new Map<string, OpenRun>();
const outboxes = new Map<string, Promise<Outbox>>();
let channel: BroadcastChannel | null = null;
let isTicking = false;

function eachOpen(work: (store: RunStore) => void): void {
  for (const { store } of runs.values()) void store.then(work, () => undefined);
}

/** The outbox of a house on this station; from the first call on it sends by itself. */
export function openOutbox(houseId: string): Promise<Outbox> {
  let outbox = outboxes.get(houseId);
  if (!outbox) {
    outbox = openEventStore(houseId).then(
      (store) => new Outbox(hubLink(), store, () => sessionState().known?.house.id === houseId),
    );
    outboxes.set(houseId, outbox);
  }
  return outbox;
}

/** Sends what is still waiting on this station, without a run open. */
export async function sendLeftOvers(houseId: string): Promise<void> {
  const store = await openEventStore(houseId);
  if ((await store.outbox()).length > 0) await openOutbox(houseId);
}

function startHeartbeat(): void {
  if (isTicking) return;
  isTicking = true;
  followBattery();
  const link = hubLink();
  hubClock.follow(link);
  link.state.subscribe(() => {
    if (link.state.get().status === 'connected') tickNow();
  });
  subscribeTick(() => {
    hubClock.look();
    eachOpen((store) => store.tick());
  });
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'hidden') eachOpen((store) => store.keep());
  });
  if ('BroadcastChannel' in globalThis) {
    channel = new BroadcastChannel('steepfall-runs');
    channel.onmessage = ({ data }) => {
      eachOpen((store) => {
        if (store.runId === data) void store.reload();
      });
    };
  }
}

function beforeNextFrame(work: () => void): void {
  if (document.visibilityState === 'visible') requestAnimationFrame(work);
  else setTimeout(work, 0);
}

async function open(runId: string): Promise<RunStore> {
  const houseId = sessionState().known?.house.id;
  if (!houseId) throw new Error('No one is signed in on this station.');
  startHeartbeat();
  const [store, outbox] = await Promise.all([openEventStore(houseId), openOutbox(houseId)]);
  const run = new RunStore({
    runId,
    link: hubLink(),
    store,
    outbox,
    clock: hubClock,
    station: stationName(),
    memberId: () => sessionState().known?.member.id ?? null,
    newId,
    schedule: beforeNextFrame,
  });
  await run.open();
  let pendingCount = run.snapshot.get().pendingCount;
  run.snapshot.subscribe(() => {
    const count = run.snapshot.get().pendingCount;
    if (count > pendingCount) channel?.postMessage(runId);
    pendingCount = count;
  });
  return run;
}

/** Opens a run, or takes the one that is open. Every call wants one `release`. */
export function takeRun(runId: string): { store: Promise<RunStore>; release: () => void } {
  let entry = runs.get(runId);
  if (!entry) {
    entry = { store: open(runId), users: 0, closeTimer: undefined };
    runs.set(runId, entry);
    entry.store.catch(() => runs.delete(runId));
  }
  const taken = entry;
  taken.users += 1;
  clearTimeout(taken.closeTimer);
  let isReleased = false;
  const release = () => {
    if (isReleased) return;
    isReleased = true;
    taken.users -= 1;
    if (taken.users > 0) return;
    taken.closeTimer = setTimeout(() => {
      runs.delete(runId);
      void taken.store.then(
        (store) => store.close(),
        () => undefined,
      );
    }, LINGER_MS);
  };
  return { store: taken.store, release };
}
