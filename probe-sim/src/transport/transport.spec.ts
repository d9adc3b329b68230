import { problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { shiftedClock, systemClock } from '../clock/index.js';
import { backoffMs } from './backoff.js';
import { hubAddress, type Door } from './door.js';
import { FakeHub } from '../testing/fake-hub.js';
import { Forwarder, type ForwarderOptions } from './forwarder.js';
import { httpDoor } from './http.js';
import { fetchRunClock, hubOffsetMs } from './hub-time.js';
import { lineSink } from './lines.js';
import { socketDoor } from './socket.js';

const startMs = 1_760_000_000_000;
const readings = (from: number, count: number): Reading[] =>
  Array.from({ length: count }, (_, i) => ({ atMs: startMs + (from + i) * 1000, tempC: 70 - i / 10 }));
const times = (from: number, count: number) => readings(from, count).map(({ atMs }) => atMs);
/** Waits are kept in the order of milliseconds: nothing here measures them. */
const hasty = { nowMs: systemClock.nowMs, sleep: (_: number, signal?: AbortSignal) => systemClock.sleep(5, signal) };
const LONG_MS = 15_000;

describe.each([
  ['http', httpDoor],
  ['socket', socketDoor],
])('forwarding over %s', (_, openDoor: (hub: string, token: string) => Door) => {
  let hub: FakeHub;
  let notices: string[];
  let forwarder: Forwarder | null = null;

  beforeEach(async () => {
    hub = new FakeHub();
    notices = [];
    await hub.start();
  });
  afterEach(async () => {
    forwarder?.close();
    await hub.stop();
  });

  const forward = (options: Partial<ForwarderOptions> = {}, token = hub.token) =>
    (forwarder = new Forwarder({
      door: openDoor(hub.url, token),
      clock: {
        ...hasty,
        sleep: (ms, signal) => (ms >= LONG_MS ? systemClock.sleep(ms, signal) : hasty.sleep(ms, signal)),
      },
      random: () => 0,
      onNotice: (text) => notices.push(text),
      ...options,
    }));

  it('delivers, counts and is quiet about it', async () => {
    const line = forward();
    line.offer(readings(0, 3));
    expect(await line.delivered(LONG_MS)).toBe(true);
    line.offer(readings(2, 3));
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.times).toEqual(times(0, 5));
    expect(line.counts).toEqual({ accepted: 5, duplicates: 1, refused: 0, dropped: 0 });
    expect(notices).toEqual([]);
  });

  it('sends again when the answer was lost, and the hub has everything once', async () => {
    hub.answersToLose = 2;
    const line = forward();
    line.offer(readings(0, 4));
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.pushes).toBe(3);
    expect(hub.times).toEqual(times(0, 4));
    expect(line.counts.duplicates).toBe(4);
    expect(notices.at(-1)).toBe('The hub is back.');
  });

  it('stores while the hub is away and forwards in order when it is back', async () => {
    const line = forward();
    line.offer(readings(0, 2));
    await line.delivered(LONG_MS);
    await hub.stop();
    line.offer(readings(2, 2));
    await until(() => line.isAway);
    line.offer(readings(4, 2));
    expect(line.waitingCount).toBe(4);
    await hub.start();
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.times).toEqual(times(0, 6));
    expect(notices).toHaveLength(2);
    expect(notices[0]).toContain('Readings wait here');
  });

  it('keeps the newest when the store is full', async () => {
    await hub.stop();
    const line = forward({ capacity: 10, batchSize: 2 });
    for (let i = 0; i < 20; i += 1) line.offer(readings(i, 1));
    await until(() => line.isAway);
    await hub.start();
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(line.counts).toMatchObject({ accepted: 10, dropped: 10 });
    expect(hub.times.slice(-9)).toEqual(times(11, 9));
    expect(notices).toContain('The store is full: the oldest readings are thrown away.');
  });

  it('stops at once when the hub does not know the token, and says so', async () => {
    const line = forward({}, 'wrong-token');
    line.offer(readings(0, 1));
    expect(await line.delivered(LONG_MS)).toBe(false);
    expect(line.failure?.message).toBe('The hub does not know this device token: It may have been rotated.');
    line.offer(readings(1, 1));
    expect(line.waitingCount).toBe(0);
    expect(hub.pushes).toBe(0);
  });

  it('tries again after "not now"', async () => {
    hub.problems.push(problem('unavailable', 'The database restarts.'), problem('too-many-tries', 'Slower.'));
    const line = forward();
    line.offer(readings(0, 2));
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.pushes).toBe(3);
    expect(hub.times).toEqual(times(0, 2));
  });

  it('does not send a batch for ever that the hub will never take', async () => {
    hub.problems.push(problem('not-valid', 'A reading is no number.'));
    const line = forward({ batchSize: 2 });
    line.offer(readings(0, 4));
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.times).toEqual(times(2, 2));
    expect(line.counts.refused).toBe(2);
    expect(notices).toEqual(['The hub refused 2 readings: A reading is no number.']);
  });

  it('makes smaller batches when one is too large', async () => {
    hub.problems.push(problem('too-large', 'At most half of that.'));
    const line = forward();
    line.offer(readings(0, 5));
    expect(await line.delivered(LONG_MS)).toBe(true);
    expect(hub.times).toEqual(times(0, 5));
    expect(hub.pushes).toBe(3);
  });

  it('says at the time limit that something is left', async () => {
    await hub.stop();
    const line = forward({ clock: systemClock });
    line.offer(readings(0, 1));
    expect(await line.delivered(50)).toBe(false);
    expect(line.failure).toBeNull();
  });
});

describe('the time of the hub', () => {
  it('is found within the time of an answer, and the run clock with the token', async () => {
    const hub = new FakeHub();
    hub.aheadMs = 90_000;
    await hub.start();
    const clock = shiftedClock(systemClock, await hubOffsetMs(hub.url, systemClock));
    expect(Math.abs(clock.nowMs() - (Date.now() + 90_000))).toBeLessThan(5000);
    expect(await fetchRunClock(hub.url, hub.token)).toEqual({ anchorWallMs: 1000, anchorRunMs: 5000, rate: 30 });
    await expect(fetchRunClock(hub.url, 'wrong')).rejects.toThrow('does not know this device token');
    await hub.stop();
    await expect(hubOffsetMs(hub.url, systemClock)).rejects.toThrow(`No answer from ${hub.url}`);
  });
});

describe(backoffMs, () => {
  it('doubles up to ten seconds, and the second half is chance', () => {
    expect([1, 2, 3, 9].map((attempt) => backoffMs(attempt, 0))).toEqual([250, 500, 1000, 5000]);
    expect([1, 2, 3, 9].map((attempt) => backoffMs(attempt, 1))).toEqual([500, 1000, 2000, 10_000]);
  });
});

describe(hubAddress, () => {
  it('takes what people type', () => {
    expect(hubAddress('localhost:4680')).toBe('http://localhost:4680');
    expect(hubAddress('https://hub.example/')).toBe('https://hub.example');
    for (const wrong of ['ftp://hub', 'http://', '://', 'http://a b', 'http://hub/run?a=b'])
      expect(() => hubAddress(wrong)).toThrow(RangeError);
  });
});

describe(lineSink, () => {
  it('writes one JSON object a line', () => {
    const lines: string[] = [];
    lineSink((line) => lines.push(line)).offer([
      { atMs: 1, tempC: 71.5 },
      { atMs: 2, tempC: null },
    ]);
    expect(lines).toEqual(['{"atMs":1,"tempC":71.5}\n', '{"atMs":2,"tempC":null}\n']);
  });
});

async function until(isTrue: () => boolean): Promise<void> {
  while (!isTrue()) await systemClock.sleep(2);
}
