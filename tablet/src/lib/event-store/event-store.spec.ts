import { IDBFactory } from 'fake-indexeddb';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import 'fake-indexeddb/auto';
import { problem } from '@steepfall/shared/problems';
import { LogBuilder } from '@steepfall/shared/testing';
import type { EventStore } from './event-store.ts';
import { IdbEventStore } from './idb-event-store.ts';
import { MemoryEventStore } from './memory-event-store.ts';

const log = new LogBuilder()
  .add('note.added', { stepId: null, text: 'one' })
  .add('note.added', { stepId: null, text: 'two' });
const [started, one, two] = log.entries as [never, (typeof log.entries)[number], (typeof log.entries)[number]];
const runId = log.last.runId;

beforeEach(() => {
  vi.stubGlobal('indexedDB', new IDBFactory());
});

describe.each([
  ['in IndexedDB', () => IdbEventStore.open('runs')],
  ['in memory', async () => new MemoryEventStore()],
] as [string, () => Promise<EventStore>][])('an event store %s', (_, make) => {
  it('puts an event into log and outbox at once, in order, and only once', async () => {
    const store = await make();
    await store.append([one, two]);
    await store.append([one]);
    const { entries, outbox } = await store.load(runId);
    expect(entries.map(({ id }) => id).sort()).toEqual([one.id, two.id].sort());
    expect(outbox.map(({ eventId, status }) => [eventId, status])).toEqual([
      [one.id, 'pending'],
      [two.id, 'pending'],
    ]);
  });

  it('takes a confirmed event out of the outbox and keeps its place in the log', async () => {
    const store = await make();
    await store.append([one, two]);
    await store.confirm([{ ...one, seq: 7, receivedAtMs: 5, sentBy: null }]);
    const { entries, outbox } = await store.load(runId);
    expect(entries.find(({ id }) => id === one.id)?.seq).toBe(7);
    expect(outbox.map(({ eventId }) => eventId)).toEqual([two.id]);
  });

  it('does not queue what the hub has already', async () => {
    const store = await make();
    await store.confirm([{ ...one, seq: 1, receivedAtMs: 5, sentBy: null }]);
    await store.append([one]);
    expect(await store.outbox()).toEqual([]);
  });

  it('parks, takes up again, and drops', async () => {
    const store = await make();
    await store.append([one, two]);
    await store.park(one.id, problem('not-valid', 'No.'));
    expect((await store.outbox()).map(({ status, problem: why }) => [status, why?.detail])).toEqual([
      ['parked', 'No.'],
      ['pending', undefined],
    ]);
    await store.mark([one.id], 'pending');
    expect((await store.outbox())[0]).toMatchObject({ status: 'pending', problem: null });
    await store.discard(one.id);
    const { entries, outbox } = await store.load(runId);
    expect([entries.length, outbox.length]).toEqual([1, 1]);
  });

  it('keeps runs apart', async () => {
    const store = await make();
    await store.append([one]);
    expect((await store.load('another')).entries).toEqual([]);
  });
});

describe(IdbEventStore, () => {
  it('survives a reload', async () => {
    await (await IdbEventStore.open('runs')).append([one, two]);
    const { entries, outbox } = await (await IdbEventStore.open('runs')).load(runId);
    expect([entries.length, outbox.length]).toEqual([2, 2]);
  });

  it('opens again when the browser has dropped the connection', async () => {
    const store = await IdbEventStore.open('runs');
    store.dropConnection();
    await store.append([one]);
    expect(await store.outbox()).toHaveLength(1);
  });

  it('lets old runs go, and none with something to send', async () => {
    let nowMs = 0;
    const store = await IdbEventStore.open('runs', () => nowMs);
    const keep = (id: string) => store.keepRun({ runId: id, summary: {} as never, readings: [], keptAtMs: nowMs });
    await store.append([{ ...one, runId: 'waiting' }]);
    for (const id of ['waiting', 'oldest']) {
      nowMs += 1;
      await keep(id);
    }
    await store.confirm([{ ...two, runId: 'oldest', seq: 1, receivedAtMs: 0, sentBy: null }]);
    for (let i = 0; i < 40; i += 1) {
      nowMs += 1;
      await keep(`run ${i}`);
    }
    const again = await IdbEventStore.open('runs');
    expect((await again.load('oldest')).entries).toEqual([]);
    expect((await again.load('waiting')).entries).toHaveLength(1);
    expect(started).toBeDefined();
  });
});
