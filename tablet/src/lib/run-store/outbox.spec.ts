import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { v5 as uuidV5 } from 'uuid';
import { problem } from '@steepfall/shared/problems';
import { LogBuilder, RUN_ID } from '@steepfall/shared/testing';
import type { EventStore } from '../event-store/event-store.ts';
import { MemoryEventStore } from '../event-store/memory-event-store.ts';
import { FakeHub } from '../../testing/fake-hub.ts';
import { Outbox, type Sent } from './outbox.ts';

function fiveNotes() {
  const log = new LogBuilder();
  for (const text of ['one', 'two', 'three', 'four', 'five']) log.add('note.added', { stepId: null, text });
  return { started: log.stored.slice(0, 1), notes: log.entries.slice(1) };
}

function setUp() {
  const { started, notes } = fiveNotes();
  const hub = new FakeHub(RUN_ID, started);
  const link = hub.connect();
  const store = new MemoryEventStore();
  const outbox = new Outbox(link, store);
  const sent: Sent[] = [];
  outbox.onSent((_, one) => sent.push(one));
  return { hub, link, store, outbox, sent, notes };
}

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

describe(Outbox, () => {
  it('sends in the order in which things were done, and empties itself on the answer', async () => {
    const { hub, store, outbox, notes } = setUp();
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.log.slice(1).map(({ id }) => id)).toEqual(notes.map(({ id }) => id));
    expect(await store.outbox()).toEqual([]);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 0 });
  });

  it('has one call in flight for a run', async () => {
    const { hub, store, outbox, notes } = setUp();
    await store.append(notes.slice(0, 2));
    const first = outbox.send(RUN_ID);
    await outbox.send(RUN_ID);
    await outbox.send(RUN_ID);
    await first;
    expect(hub.appends).toHaveLength(1);
  });

  it('parks the second of five, and the other four arrive', async () => {
    const { hub, store, outbox, sent, notes } = setUp();
    hub.refusals.set(notes[1]!.id, problem('not-valid', 'It does not fit.'));
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.log.slice(1).map(({ id }) => id)).toEqual([0, 2, 3, 4].map((i) => notes[i]!.id));
    expect(await store.outbox()).toMatchObject([{ eventId: notes[1]!.id, status: 'parked' }]);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 1 });
    expect(sent.find(({ kind }) => kind === 'parked')).toMatchObject({ eventId: notes[1]!.id });
  });

  it('finds the bad one by itself when the hub refuses the whole call', async () => {
    const { hub, store, outbox, notes } = setUp();
    hub.failNext = problem('not-valid', 'Something in it does not fit.');
    hub.refusals.set(notes[2]!.id, problem('not-valid', 'This one.'));
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.log).toHaveLength(5);
    expect(await store.outbox()).toMatchObject([{ eventId: notes[2]!.id, status: 'parked' }]);
  });

  it('sends again after a lost answer, and the hub has each of them once', async () => {
    const { hub, store, outbox, notes } = setUp();
    hub.lostAnswers = 1;
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(await store.outbox()).toMatchObject(notes.map(({ id }) => ({ eventId: id, status: 'pending' })));
    await vi.advanceTimersByTimeAsync(1_000);
    expect(hub.appends).toHaveLength(2);
    expect(hub.log).toHaveLength(6);
    expect(await store.outbox()).toEqual([]);
  });

  it('waits for the line, and goes on by itself when it is back', async () => {
    const { hub, link, store, outbox, notes } = setUp();
    link.setConnected(false);
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.appends).toEqual([]);
    expect(outbox.counts.get().waiting).toBe(5);
    link.setConnected(true);
    await vi.advanceTimersByTimeAsync(0);
    expect(hub.log).toHaveLength(6);
  });

  it('tries again later, not at once, when the hub has trouble of its own', async () => {
    const { hub, store, outbox, notes } = setUp();
    hub.failNext = problem('unavailable', 'The database is away.');
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.appends).toHaveLength(1);
    await vi.advanceTimersByTimeAsync(999);
    expect(hub.appends).toHaveLength(1);
    await vi.advanceTimersByTimeAsync(2);
    expect(hub.log).toHaveLength(6);
  });

  it('lets go of what the hub found out as well', async () => {
    const { hub, store, outbox, sent, notes } = setUp();
    const found = { ...notes[0]!, id: uuidV5('steep/now', RUN_ID) };
    hub.refusals.set(found.id, problem('event-id-taken', 'Another event has this id.'));
    await store.append([found]);
    await outbox.send(RUN_ID);
    expect(await store.outbox()).toEqual([]);
    expect(sent).toEqual([{ kind: 'dropped', eventId: found.id }]);
  });

  it('sends a parked one again when a person asks for it, or drops it', async () => {
    const { hub, store, outbox, notes } = setUp();
    hub.refusals.set(notes[0]!.id, problem('not-allowed', 'No.'));
    await store.append(notes.slice(0, 1));
    await outbox.send(RUN_ID);
    hub.refusals.clear();
    await outbox.retry(notes[0]!.id);
    expect(hub.log).toHaveLength(2);

    hub.refusals.set(notes[1]!.id, problem('not-allowed', 'No.'));
    await store.append(notes.slice(1, 2));
    await outbox.send(RUN_ID);
    await outbox.giveUp(RUN_ID, notes[1]!.id);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 0 });
  });

  it.each(['not-signed-in', 'not-allowed', 'run-not-found'] as const)(
    'keeps everything when the hub answers the whole call with %s: that says nothing of the events',
    async (type) => {
      const { hub, store, outbox, notes } = setUp();
      hub.failNext = problem(type, 'Not now.');
      await store.append(notes.slice(0, 1));
      await outbox.send(RUN_ID);
      expect(await store.outbox()).toMatchObject([{ status: 'pending' }]);
      await vi.advanceTimersByTimeAsync(1_000);
      expect(await store.outbox()).toEqual([]);
    },
  );

  it('sends nothing while somebody of another house is signed in', async () => {
    const { hub, link, store, notes } = setUp();
    let isOwnHouse = false;
    const outbox = new Outbox(link, store, () => isOwnHouse);
    await store.append(notes);
    await outbox.send(RUN_ID);
    expect(hub.appends).toEqual([]);
    isOwnHouse = true;
    await outbox.send(RUN_ID);
    expect(hub.log).toHaveLength(6);
  });

  it('sends, parks and sends again with a store that takes nothing', async () => {
    const { hub, link, notes } = setUp();
    const no = () => Promise.reject(new Error('The store is gone.'));
    const store: EventStore = {
      isDurable: true,
      load: no,
      append: no,
      confirm: no,
      mark: no,
      park: no,
      discard: no,
      outbox: no,
      keepRun: no,
    };
    const outbox = new Outbox(link, store);
    hub.refusals.set(notes[1]!.id, problem('not-valid', 'It does not fit.'));
    outbox.carry(notes);
    await outbox.send(RUN_ID);
    expect(hub.log).toHaveLength(5);
    expect(outbox.parkedInMemory(RUN_ID)).toMatchObject([{ eventId: notes[1]!.id }]);
    hub.refusals.clear();
    await outbox.retry(notes[1]!.id);
    expect(hub.log).toHaveLength(6);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 0 });
  });

  it('settles an event once when the store can be read and not written', async () => {
    const { hub, store, outbox, sent, notes } = setUp();
    await store.append(notes.slice(0, 2));
    hub.refusals.set(notes[1]!.id, problem('not-valid', 'It does not fit.'));
    for (const method of ['mark', 'confirm', 'park', 'discard'] as const)
      vi.spyOn(store, method).mockRejectedValue(new Error('The disk is full.'));
    await outbox.send(RUN_ID);
    expect(sent.map(({ kind }) => kind)).toEqual(['confirmed', 'parked']);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 1 });
    await outbox.giveUp(RUN_ID, notes[1]!.id);
    expect(outbox.counts.get()).toEqual({ waiting: 0, parked: 0 });
    expect(hub.appends).toHaveLength(1);
  });

  it('carries what the store could not take', async () => {
    const { hub, outbox, notes } = setUp();
    outbox.carry(notes);
    await outbox.send(RUN_ID);
    expect(hub.log.slice(1).map(({ id }) => id)).toEqual(notes.map(({ id }) => id));
    expect(outbox.counts.get().waiting).toBe(0);
  });
});
